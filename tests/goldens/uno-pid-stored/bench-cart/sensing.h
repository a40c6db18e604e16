// Part of the firmware of bench-cart. Written by fairlead 0.1.0; change the build sheet, not
// this file.
//
// From readings to the line's offset at the bar.
#pragma once

#include <stdint.h>

struct Sight {
  bool found;  // the line is under the bar
  bool wide;   // the bar lies on a crossing
  int16_t
      offsetMmQ6;  // the line's middle, left of the bar's middle; the last one seen while not found
  int8_t reach;    // end of the bar that a too wide line reaches, as at a corner: 1 left, -1 right
};

// Forgets the line.
void resetSensing();

// Takes the reading of one sensor; the leftmost, number 0, begins a set. Each can be taken
// while the converter is still busy with the next.
void takeReading(uint8_t i, int16_t count);

// Finds the line in the last set of readings.
const Sight& findLine();
