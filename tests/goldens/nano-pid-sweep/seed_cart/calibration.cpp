// Part of the firmware of seed_cart. Written by fairlead 0.1.0; change the build sheet, not
// this file.
//
// At the start the bar stands over the line, so that its end sensors see ground. Whether their
// readings then rise further than they fall tells whether the line reads higher than the ground.
#include "calibration.h"

namespace {

int16_t initial[SENSOR_COUNT];
int16_t least[SENSOR_COUNT];
int16_t most[SENSOR_COUNT];
bool started;

// How much further a sensor's reading rose above its first value than it fell below it.
int32_t riseOf(uint8_t i) {
  return int32_t{most[i]} + least[i] - int32_t{2} * initial[i];
}

}  // namespace

void startCalibration() {
  started = false;
}

void observe(const int16_t (&counts)[SENSOR_COUNT]) {
  for (uint8_t i = 0; i < SENSOR_COUNT; i++) {
    if (!started) initial[i] = least[i] = most[i] = counts[i];
    if (counts[i] < least[i]) least[i] = counts[i];
    if (counts[i] > most[i]) most[i] = counts[i];
  }
  started = true;
}

uint8_t finishCalibration(int16_t (&groundCounts)[SENSOR_COUNT],
                          int16_t (&coverage255thsPerCountQ12)[SENSOR_COUNT]) {
  const bool lineReadsHigher = riseOf(0) + riseOf(SENSOR_COUNT - 1) >= 0;
  uint8_t flatSensor = 0;
  for (uint8_t i = 0; i < SENSOR_COUNT; i++) {
    const int16_t span = static_cast<int16_t>(most[i] - least[i]);
    groundCounts[i] = coverage255thsPerCountQ12[i] = 0;
    if (span < SWEEP_LEAST_SPAN_COUNTS) {
      if (flatSensor == 0) flatSensor = static_cast<uint8_t>(i + 1);
      continue;
    }
    // The only division, of positive numbers; up, so that the line itself is a full coverage.
    const int16_t scale = static_cast<int16_t>(
        ((int32_t{FULL_COVERAGE_255THS} << CALIBRATION_BITS) + span - 1) / span);
    groundCounts[i] = lineReadsHigher ? least[i] : most[i];
    coverage255thsPerCountQ12[i] = static_cast<int16_t>(lineReadsHigher ? scale : -scale);
  }
  return flatSensor;
}
