// Part of the firmware of seed_cart. Written by fairlead 0.1.0; change the build sheet, not
// this file.
//
// The motion of the calibration: the bar turns left, then right across the line, then back to it.
#pragma once

#include <stdint.h>

#include "constants.h"

enum class SweepResult : uint8_t { Turning, Done, FlatSensor, LineNotFound };

struct Sweep {
  SweepResult result;
  uint8_t flatSensor;   // number of the sensor without contrast, from the left and from 1
  int16_t dutyLeftQ12;  // positive drives forward
  int16_t dutyRightQ12;
};

void startSweep();

// One sample period; readings leftmost sensor first.
const Sweep& stepSweep(const int16_t (&counts)[SENSOR_COUNT]);
