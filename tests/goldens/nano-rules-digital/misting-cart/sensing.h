// Part of the firmware of misting-cart. Written by fairlead 0.1.0; change the build sheet, not
// this file.
//
// From readings to the line's offset at the bar.
#pragma once

#include <stdint.h>

struct Sight {
  bool found;  // the line is under the bar
  int16_t
      offsetMmQ6;  // the line's middle, left of the bar's middle; the last one seen while not found
  int8_t reach;    // end of the bar that a too wide line reaches, as at a corner: 1 left, -1 right
  uint8_t first;   // the run of sensors taken for the line
  uint8_t last;
};

// Forgets the line.
void resetSensing();

// Takes the reading of one sensor, 0 or 1; the leftmost, number 0, begins a set. Each can be taken
// while the converter is still busy with the next.
void takeReading(uint8_t i, int16_t count);

// Finds the line in the last set of readings.
const Sight& findLine();
