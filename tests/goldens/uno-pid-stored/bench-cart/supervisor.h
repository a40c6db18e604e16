// Part of the firmware of bench-cart. Written by fairlead 0.1.0; change the build sheet, not
// this file.
//
// When the vehicle moves and when it does not.
#pragma once

#include <stdint.h>

// Ready, LineLost, Stopped and Fault wait for the button, motors off.
enum class State : uint8_t { Ready, Countdown, Running, LineLost, Stopped, Fault };

// Why the vehicle stands still: its number is that of the flashes.
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
};

inline bool isMoving(State state) {
  return state == State::Running;
}

State currentState();

// Why the vehicle stands still; kept until it next stops.
Reason lastReason();

void setupSupervisor();

// One sample period.
void superviseSample();
