// Part of the firmware of bench-cart. Written by fairlead 0.1.0; change the build sheet, not
// this file.
//
// Readings -> offset -> phase -> curvature -> speed class -> wheel speeds -> duties.
// The command is a curvature, a turn for each metre driven, so that one tuning serves neighbouring
// speeds. The vehicle's speed is not measured: a first-order model of the motors, driven by the
// very command that the wheels get, stands in for it. Only sums, products, comparisons and shifts
// to the right; constants.h shows that none leaves 32 bits.
#include "steering.h"

namespace {

Steering steering;
int32_t filtered;   // low-passed input, FILTER_BITS more bits
int32_t demand;     // low-passed curvature, FILTER_BITS more bits
int32_t held;       // curvature to hold while the line is not seen, FILTER_BITS more bits
int32_t travelled;  // way in this phase; 0 while the line is followed
uint16_t searched;  // samples of the search
int8_t side;        // side on which the line was last seen: 1 left, -1 right
int32_t bend;       // curvature of the bend that the vehicle is in
int32_t release;    // way to go until the bend is over
int32_t corner;     // way to go in which a vanished line is taken for a corner
int8_t cornerSide;

int32_t clamped(int32_t value, int32_t limit) {
  if (value > limit) return limit;
  if (value < -limit) return -limit;
  return value;
}

int16_t clamped16(int32_t value) {
  return static_cast<int16_t>(clamped(value, INT16_MAX));
}

// What a first-order filter moves in one sample: the change times its coefficient. A shift by 16
// moves whole bytes; one by 15 would take the processor 15 turns.
int32_t filterStep(int16_t change, int16_t coefficientQ15) {
  return (int32_t{change} * coefficientQ15 * 2) >> (COEFFICIENT_BITS + 1);
}

void enter(Phase phase) {
  if (phase == steering.phase) return;
  steering.phase = phase;
  travelled = 0;
}

void cross() {
  corner = 0;
  enter(Phase::Crossing);
  if (travelled > CROSSING_MM_S_Q6_SAMPLES) enter(Phase::Search);
}

void see(const Sight& sight) {
  enter(Phase::Follow);
  if (sight.offsetMmQ6 != 0) side = sight.offsetMmQ6 > 0 ? 1 : -1;
  if (sight.reach != 0) {
    corner = CORNER_MM_S_Q6_SAMPLES;
    cornerSide = sight.reach;
  }
}

void miss(const Sight& sight) {
  if (steering.phase == Phase::Follow || steering.phase == Phase::Crossing) {
    const bool bySide =
        sight.offsetMmQ6 > SIDE_OFFSET_MM_Q6 || sight.offsetMmQ6 < -SIDE_OFFSET_MM_Q6;
    if (corner > 0) side = cornerSide;
    enter(bySide || corner > 0 ? Phase::Search : Phase::Gap);
  } else if (steering.phase == Phase::Gap) {
    if (travelled > GAP_MM_S_Q6_SAMPLES) enter(Phase::Search);
  } else if (searched >= SEARCH_SAMPLES) {
    enter(Phase::Stopped);
  }
}

// What is done while the line is not seen as usual: crossing, gap, corner, search, stop.
void updatePhase(const Sight& sight) {
  if (corner > 0) corner -= steering.speedMmSQ6;
  // A bar that stays on the line everywhere ends a search, and with it the run, like one that sees
  // none.
  if (sight.wide && steering.phase != Phase::Search) {
    cross();
  } else if (sight.found) {
    see(sight);
  } else {
    miss(sight);
  }
  // Only what a limit is set on is counted: a sum without end would overflow.
  if (steering.phase == Phase::Follow) {
    travelled = 0;
  } else {
    travelled += steering.speedMmSQ6;
  }
  if (steering.phase == Phase::Search) {
    searched++;
  } else {
    searched = 0;
  }
}

// Curvature from the offset: proportional plus filtered derivative.
void follow(const Sight& sight, bool regained) {
  const SpeedClass& gains = SPEED_CLASSES[steering.classIndex];
  const int16_t input = clamped16(sight.offsetMmQ6);
  const int32_t fineInput = int32_t{input} * (1 << FILTER_BITS);
  if (regained) filtered = fineInput;
  const int16_t change = clamped16(fineInput - filtered);
  filtered += filterStep(change, gains.derivativeFilterQ15);
  const int32_t sum = int32_t{input} * gains.proportional + int32_t{change} * gains.derivative;
  steering.curvaturePerMQ8 = clamped(sum >> GAIN_BITS, CURVATURE_LIMIT_PER_M_Q8);
  held +=
      filterStep(clamped16(steering.curvaturePerMQ8 * (1 << FILTER_BITS) - held), HOLD_FILTER_Q15);
}

// Slower at once when the demand for curvature rises, faster again by way driven out of the bend.
void followBend() {
  const int32_t curvature = steering.curvaturePerMQ8;
  const int32_t size = curvature < 0 ? -curvature : curvature;
  demand += filterStep(clamped16(size * (1 << FILTER_BITS) - demand), DEMAND_FILTER_Q15);
  const int32_t tightest = SPEED_CLASSES[CLASS_COUNT - 1].curvaturePerMQ8;
  int32_t asked = demand >> FILTER_BITS;
  if (asked > tightest) asked = tightest;
  if (asked >= bend) {
    bend = asked;
    release = RELEASE_MM_S_Q6_SAMPLES;
  } else {
    release -= steering.speedMmSQ6;
    if (release <= 0) {
      release = 0;
      bend = asked;
    }
  }
  uint8_t index = 0;
  while (index < CLASS_COUNT - 1 && bend > SPEED_CLASSES[index].curvaturePerMQ8) index++;
  steering.classIndex = index;
}

// Speed for the bend that the vehicle is in.
int32_t targetSpeedMmSQ6() {
  if (steering.phase == Phase::Search) return SEARCH_SPEED_MM_S_Q6;
  const SpeedClass& speeds = SPEED_CLASSES[steering.classIndex];
  return speeds.speedMmSQ6 +
         (((speeds.curvaturePerMQ8 - bend) * speeds.speedSlope) >> SPEED_SLOPE_BITS);
}

// Inverts the motor's dead zone and speed line.
int16_t dutyFor(int32_t wheelMmS, int16_t startDutyQ12, int32_t dutyPerMmSQ24) {
  const int32_t size = wheelMmS < 0 ? -wheelMmS : wheelMmS;
  if (size <= WHEEL_DEAD_MM_S) return 0;
  int32_t duty = startDutyQ12 + ((size * dutyPerMmSQ24) >> SLOPE_BITS);
  if (duty > FULL_DUTY_Q12) duty = FULL_DUTY_Q12;
  return static_cast<int16_t>(wheelMmS < 0 ? -duty : duty);
}

// From speed and curvature to duties; the wheels' difference is kept when one of them saturates.
void drive() {
  int32_t lead = (targetSpeedMmSQ6() - steering.speedMmSQ6) * (1 << SPEED_GAIN_BITS);
  if (lead > LEAD_UP_MM_S_Q6) lead = LEAD_UP_MM_S_Q6;
  if (lead < -LEAD_DOWN_MM_S_Q6) lead = -LEAD_DOWN_MM_S_Q6;
  const int32_t base = (steering.speedMmSQ6 + lead) >> SPEED_BITS;

  const int32_t wanted =
      ((steering.speedMmSQ6 >> SPEED_BITS) * steering.curvaturePerMQ8) >> CURVATURE_BITS;
  const int32_t turn = clamped(wanted, TURN_LIMIT_MRAD_S);
  const int32_t half = (turn * HALF_TRACK_M_Q16) >> TRACK_BITS;
  int32_t left = base - half;
  int32_t right = base + half;
  const int32_t outer = left > right ? left : right;
  if (outer > WHEEL_LIMIT_MM_S) {
    left -= outer - WHEEL_LIMIT_MM_S;
    right -= outer - WHEEL_LIMIT_MM_S;
  }
  left = clamped(left, WHEEL_LIMIT_MM_S);
  right = clamped(right, WHEEL_LIMIT_MM_S);

  const int32_t middle = (left + right) * (1 << (SPEED_BITS - 1));
  const int32_t lag = (middle - steering.speedMmSQ6) >> SPEED_MODEL_BITS;
  steering.speedMmSQ6 += (lag * MOTOR_STEP_Q15) >> (COEFFICIENT_BITS - SPEED_MODEL_BITS);
  if (steering.speedMmSQ6 < 0) steering.speedMmSQ6 = 0;
  steering.dutyLeftQ12 = dutyFor(left, START_DUTY_LEFT_Q12, DUTY_LEFT_PER_MM_S_Q24);
  steering.dutyRightQ12 = dutyFor(right, START_DUTY_RIGHT_Q12, DUTY_RIGHT_PER_MM_S_Q24);
}

}  // namespace

void startSteering() {
  resetSensing();
  steering = Steering();
  filtered = demand = held = travelled = bend = release = corner = 0;
  searched = 0;
  side = cornerSide = 1;
}

const Steering& steer(const int16_t (&counts)[SENSOR_COUNT]) {
  if (steering.phase == Phase::Stopped) return steering;
  const Sight& sight = findLine(counts);
  const Phase before = steering.phase;
  updatePhase(sight);
  if (steering.phase == Phase::Stopped) {
    steering.dutyLeftQ12 = steering.dutyRightQ12 = 0;
    steering.speedMmSQ6 = 0;
    return steering;
  }
  if (steering.phase == Phase::Follow) {
    follow(sight, before != Phase::Follow);
  } else if (steering.phase == Phase::Search) {
    steering.curvaturePerMQ8 = side * SEARCH_CURVATURE_PER_M_Q8;
  } else {
    steering.curvaturePerMQ8 = held >> FILTER_BITS;
  }
  followBend();
  drive();
  return steering;
}
