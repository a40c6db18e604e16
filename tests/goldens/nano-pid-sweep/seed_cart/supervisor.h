// Part of the firmware of seed_cart. Written by fairlead 0.1.0; change the build sheet, not
// this file.
//
// When the vehicle moves and when it does not.
#pragma once

#include <stdint.h>

// Ready, LineLost, Stopped and Fault wait for the button, motors off.
enum class State : uint8_t { Ready, Countdown, Calibrating, Running, LineLost, Stopped, Fault };

// Why the vehicle stands still.
enum class Reason : uint8_t {
  // ready
  Ready = 1,
  // stopped by the button
  Button = 2,
  // the line was lost and the search did not find it
  LineLost = 3,
  // the run limit was reached
  RunLimit = 4,
  // the control loop missed its period too often
  Overrun = 5,
  // restarted by the watchdog after the program hung
  Watchdog = 6,
  // restarted after the supply voltage broke down
  BrownOut = 7,
  // calibration refused: a sensor saw too little contrast; then its number, from the left
  FlatSensor = 8,
  // calibration refused: the line was not found again
  LineNotFound = 9,
};

inline bool isMoving(State state) {
  return state == State::Calibrating || state == State::Running;
}

State currentState();

// Why the vehicle stands still; kept until it next stops.
Reason lastReason();

// With Reason::FlatSensor: the sensor's number, from the left and from 1; else 0.
uint8_t flatSensor();

void setupSupervisor();

// One sample period.
void superviseSample();
