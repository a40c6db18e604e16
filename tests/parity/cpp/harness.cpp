// Drives the emitted control law with a trace, on the host or on the emulated chip, and reports every
// step's result. Input and output: io.h of the host/ or the chip/ folder. Includes sensing.cpp itself to see
// the line's offset, which the firmware keeps to itself.
#include "io.h"
#include "sensing.cpp"
#include "steering.h"
#if __has_include("wheel_loop.h")
#include "wheel_loop.h"
#define ENCODERS 1
#else
#define ENCODERS 0
#endif
#if __has_include("calibration.h")
#include "calibration.h"
#define SWEEP 1
#else
#define SWEEP 0
#endif

namespace {

void getCounts(int16_t (&counts)[SENSOR_COUNT]) {
  for (uint8_t i = 0; i < SENSOR_COUNT; i++) counts[i] = static_cast<int16_t>(getNumber());
}

#if SWEEP
void calibrateOn(int32_t samples) {
  int16_t counts[SENSOR_COUNT];
  startCalibration();
  for (int32_t i = 0; i < samples; i++) {
    getCounts(counts);
    observe(counts);
  }
  int16_t ground[SENSOR_COUNT];
  int16_t gain[SENSOR_COUNT];
  putNumber(finishCalibration(ground, gain));
  for (uint8_t i = 0; i < SENSOR_COUNT; i++) putNumber(ground[i]);
  for (uint8_t i = 0; i < SENSOR_COUNT; i++) putNumber(gain[i]);
  setCalibration(ground, gain);
}
#endif

}  // namespace

int main() {
  openStreams();
#if SWEEP
  calibrateOn(getNumber());
#endif
  const int32_t steps = getNumber();
  const int32_t restartEvery = getNumber();
  int16_t counts[SENSOR_COUNT];
  int32_t untilRestart = 0;
  for (int32_t i = 0; i < steps; i++) {
    if (untilRestart-- == 0) {
      startSteering();
      untilRestart = restartEvery - 1;
    }
    getCounts(counts);
    // The others are taken while the converter is busy.
    for (uint8_t k = 0; k + 1 < SENSOR_COUNT; k++) takeReading(k, counts[k]);
#if ENCODERS
    const int16_t left = static_cast<int16_t>(getNumber());
    countEdges(left, static_cast<int16_t>(getNumber()));
#endif
    markStep(true);
    takeReading(SENSOR_COUNT - 1, counts[SENSOR_COUNT - 1]);
    const Steering& now = steer();
    markStep(false);
    advance();
    putNumber(static_cast<int32_t>(now.phase));
    putNumber(classInForce());
    putNumber(sight.offsetMmQ6);
    putNumber(now.curvaturePerMQ8);
    putNumber(now.speedQ29);
    putNumber(now.dutyLeftQ12);
    putNumber(now.dutyRightQ12);
#if ENCODERS
    putNumber(wheelBlocked());
#else
    putNumber(0);
#endif
  }
  closeStreams();
  return 0;
}
