// Part of the firmware of misting-cart. Written by fairlead 0.1.0; change the build sheet, not
// this file.
//
// From the line's offset to the duties of the two wheels: one step a sample period.
#pragma once

#include <stdint.h>

// Where in the course of following a line the vehicle is; numbers as in a run log.
enum class Phase : uint8_t {
  Follow = 0,
  Gap = 2,
  Search = 3,
  Stopped = 4,
};

struct Steering {
  Phase phase;
  int16_t curvaturePerMQ8;  // commanded
  int32_t speedQ29;         // of the vehicle, modelled: share of the speed at full duty
  int16_t dutyLeftQ12;      // -FULL_DUTY_Q12 to FULL_DUTY_Q12; positive drives forward
  int16_t dutyRightQ12;
};

// Puts the controller into the state at the start of a run.
void startSteering();

// Number of the speed class in force, from 0, the fastest.
uint8_t classInForce();

// One sample period: from the readings taken to duties. Phase::Stopped lasts until the next start.
const Steering& steer();

// The rest of the step, which can wait until the motors have their duties: modelled speed, memory.
void advance();
