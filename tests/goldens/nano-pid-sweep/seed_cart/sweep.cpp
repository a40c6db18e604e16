// Part of the firmware of seed_cart. Written by fairlead 0.1.0; change the build sheet, not
// this file.
#include "sweep.h"

#include "calibration.h"
#include "sensing.h"

namespace {

constexpr uint32_t MEASURED_SAMPLES = uint32_t{3} * SWEEP_TURN_SAMPLES;
constexpr uint32_t ALL_SAMPLES = MEASURED_SAMPLES + SWEEP_RETURN_SAMPLES;

Sweep sweep;
uint32_t samples;

void turn(bool left) {
  sweep.dutyLeftQ12 = left ? -SWEEP_DUTY_LEFT_Q12 : SWEEP_DUTY_LEFT_Q12;
  sweep.dutyRightQ12 = left ? SWEEP_DUTY_RIGHT_Q12 : -SWEEP_DUTY_RIGHT_Q12;
}

void end(SweepResult result) {
  sweep.result = result;
  sweep.dutyLeftQ12 = sweep.dutyRightQ12 = 0;
}

void takeOverCalibration() {
  int16_t groundCounts[SENSOR_COUNT];
  int16_t coverage255thsPerCountQ12[SENSOR_COUNT];
  sweep.flatSensor = finishCalibration(groundCounts, coverage255thsPerCountQ12);
  if (sweep.flatSensor != 0) {
    end(SweepResult::FlatSensor);
    return;
  }
  setCalibration(groundCounts, coverage255thsPerCountQ12);
  resetSensing();
}

void lookForLine() {
  const Sight& sight = findLine();
  const bool centred =
      sight.offsetMmQ6 <= SWEEP_CENTRE_MM_Q6 && sight.offsetMmQ6 >= -SWEEP_CENTRE_MM_Q6;
  if (sight.found && centred) end(SweepResult::Done);
}

}  // namespace

void startSweep() {
  sweep = Sweep();
  samples = 0;
  startCalibration();
}

const Sweep& stepSweep(const int16_t (&counts)[SENSOR_COUNT]) {
  if (samples < MEASURED_SAMPLES) {
    observe(counts);
    turn(samples < SWEEP_TURN_SAMPLES);
  } else if (samples == MEASURED_SAMPLES) {
    turn(true);
    takeOverCalibration();
  } else if (samples < ALL_SAMPLES) {
    lookForLine();
  } else {
    end(SweepResult::LineNotFound);
  }
  samples++;
  return sweep;
}
