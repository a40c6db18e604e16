// Part of the firmware of seed_cart. Written by fairlead 0.1.0; change the build sheet, not
// this file.
//
// Calibration by sweep: while the bar turns across the line, the least and the largest reading of
// each sensor are kept; afterwards they give ground and coverage per count.
#pragma once

#include <stdint.h>

#include "constants.h"

// Forgets what was seen.
void startCalibration();

// Takes one set of readings, leftmost sensor first.
void observe(const int16_t (&counts)[SENSOR_COUNT]);

// Works out what was seen. Returns the number, from the left and from 1, of the first sensor with
// too little contrast between line and ground, or 0 when all are well.
uint8_t finishCalibration(int16_t (&groundCounts)[SENSOR_COUNT],
                          int16_t (&coverage255thsPerCountQ12)[SENSOR_COUNT]);
