// Part of the firmware of seed_cart. Written by fairlead 0.1.0; change the build sheet, not
// this file.
//
// Readings -> offset -> phase -> curvature -> speed class -> wheel speeds -> duties.
// The command is a curvature, a turn for each metre driven, so that one tuning serves neighbouring
// speeds. The vehicle's speed is not measured: a first-order model of the motors, driven by the
// very command that the wheels get, stands in for it. Only sums, products, comparisons and shifts;
// constants.h shows that none leaves 32 bits. Speeds are shares of the speed at full duty: so all
// that is multiplied fits 16 bits, and the shifts are by whole bytes or few bits.
// What runs in each sample is compiled for speed, not for size.
#pragma GCC optimize("O2")

#include "steering.h"

#include "arithmetic.h"
#include "constants.h"
#include "sensing.h"

namespace {

Steering steering;
constexpr const SpeedClass* LAST_CLASS = SPEED_CLASSES + CLASS_COUNT - 1;
const SpeedClass* speedClass;  // in force
int32_t filtered;              // low-passed input, FILTER_BITS more bits
int32_t demand;                // low-passed curvature, COEFFICIENT_BITS more bits
int32_t held;       // curvature to hold while the line is not seen, COEFFICIENT_BITS more bits
int32_t travelled;  // way in this phase; 0 while the line is followed
uint16_t searched;  // samples of the search
int8_t side;        // side on which the line was last seen: 1 left, -1 right
int16_t bend;       // curvature of the bend that the vehicle is in
int32_t release;    // way to go until the bend is over
int32_t corner;     // way to go in which a vanished line is taken for a corner
int8_t cornerSide;
int16_t lag;  // of the modelled speed behind the wheels' command, doubled

int16_t clamped16(int32_t value, int16_t limit) {
  if (value > limit) return limit;
  if (value < -limit) return static_cast<int16_t>(-limit);
  return static_cast<int16_t>(value);
}

int16_t clamped(int16_t value, int16_t limit) {
  if (value > limit) return limit;
  if (value < -limit) return static_cast<int16_t>(-limit);
  return value;
}

static_assert(COEFFICIENT_BITS == 15, "doubled, a high word");

// A filter's value, without the bits of its coefficient.
int16_t wholeOf(int32_t filterState) {
  return highWord(filterState * 2);
}

// One sample of a first-order filter.
inline void filter(int32_t& filterState, int16_t input, int16_t coefficientQ15) {
  const int16_t change = static_cast<int16_t>(input - wholeOf(filterState));
  addProduct(filterState, change, coefficientQ15);
}

static_assert(SPEED_MODEL_BITS - SPEED_BITS == 16 && SPEED_MODEL_BITS - CLASS_SPEED_BITS == 14,
              "speeds are high words");

int16_t speedQ13() {
  return highWord(steering.speedQ29);
}

int16_t speedQ15() {
  return highWord(steering.speedQ29 * 4);
}

void enter(Phase phase) {
  if (phase == steering.phase) return;
  steering.phase = phase;
  travelled = 0;
}

void cross() {
  corner = 0;
  enter(Phase::Crossing);
  if (travelled > CROSSING_SPEED_Q13_SAMPLES) enter(Phase::Search);
}

void see(const Sight& sight) {
  enter(Phase::Follow);
  if (sight.offsetMmQ6 != 0) side = sight.offsetMmQ6 > 0 ? 1 : -1;
  if (sight.reach != 0) {
    corner = CORNER_SPEED_Q13_SAMPLES;
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
    if (travelled > GAP_SPEED_Q13_SAMPLES) enter(Phase::Search);
  } else if (searched >= SEARCH_SAMPLES) {
    enter(Phase::Stopped);
  }
}

// What is done while the line is not seen as usual: crossing, gap, corner, search, stop.
void updatePhase(const Sight& sight) {
  if (corner > 0) corner -= speedQ13();
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
    travelled += speedQ13();
  }
  if (steering.phase == Phase::Search) {
    searched++;
  } else {
    searched = 0;
  }
}

constexpr int32_t SUM_LIMIT = int32_t{CURVATURE_LIMIT_PER_M_Q8} << GAIN_BITS;

// Curvature from the offset: proportional plus filtered derivative.
void follow(int16_t input, bool regained) {
  const SpeedClass& gains = *speedClass;
  const int32_t fineInput = product(input, 1 << FILTER_BITS);
  if (regained) filtered = fineInput;
  const int16_t change = clamped16(fineInput - filtered, INT16_MAX);
  filtered += highWord(product(change, gains.derivativeFilterQ15) * 2);
  int32_t sum = product(input, gains.proportional);
  addProduct(sum, change, gains.derivative);
  // Limits first: then the sum fits with as many bits more as make it a high word.
  if (sum > SUM_LIMIT) sum = SUM_LIMIT;
  if (sum < -SUM_LIMIT) sum = -SUM_LIMIT;
  steering.curvaturePerMQ8 = highWord(sum * (int32_t{1} << (16 - GAIN_BITS)));
}

// Slower at once when the demand for curvature rises, faster again by way driven out of the bend.
void followBend() {
  const int16_t curvature = steering.curvaturePerMQ8;
  filter(demand, static_cast<int16_t>(curvature < 0 ? -curvature : curvature), DEMAND_FILTER_Q15);
  constexpr int16_t TIGHTEST = SPEED_CLASSES[CLASS_COUNT - 1].curvaturePerMQ8;
  int16_t asked = wholeOf(demand);
  if (asked > TIGHTEST) asked = TIGHTEST;
  if (asked >= bend) {
    bend = asked;
    release = RELEASE_SPEED_Q13_SAMPLES;
  } else {
    release -= speedQ13();
    if (release <= 0) {
      release = 0;
      bend = asked;
    }
  }
  while (speedClass > SPEED_CLASSES && bend <= speedClass[-1].curvaturePerMQ8) speedClass--;
  while (speedClass < LAST_CLASS && bend > speedClass->curvaturePerMQ8) speedClass++;
}

// Speed for the bend that the vehicle is in.
int16_t targetSpeedQ15() {
  if (steering.phase == Phase::Search) return SEARCH_SPEED_Q15;
  const SpeedClass& speeds = *speedClass;
  const int16_t below = static_cast<int16_t>(speeds.curvaturePerMQ8 - bend);
  return static_cast<int16_t>(
      speeds.speedQ15 +
      static_cast<int16_t>(product(below, speeds.speedSlope) >> SPEED_SLOPE_BITS));
}

// Inverts the motor's dead zone and speed line.
__attribute__((always_inline)) inline int16_t dutyFor(int16_t wheelQ13, int16_t startDutyQ12,
                                                      int16_t dutyPerSpeedQ14) {
  const int16_t size = static_cast<int16_t>(wheelQ13 < 0 ? -wheelQ13 : wheelQ13);
  if (size <= WHEEL_DEAD_SPEED_Q13) return 0;
  static_assert(SLOPE_BITS == 15, "doubled, a high word");
  int16_t duty = static_cast<int16_t>(startDutyQ12 +
                                      highProduct(static_cast<int16_t>(size * 2), dutyPerSpeedQ14));
  if (duty > FULL_DUTY_Q12) duty = FULL_DUTY_Q12;
  return static_cast<int16_t>(wheelQ13 < 0 ? -duty : duty);
}

// From speed and curvature to duties; the wheels' difference is kept when one of them saturates.
void drive() {
  const int16_t speed = speedQ13();
  // A difference of speeds with two more bits is four times as large: the gain of the speed error.
  int16_t lead = static_cast<int16_t>(targetSpeedQ15() - speedQ15());
  if (lead > LEAD_UP_SPEED_Q13) lead = LEAD_UP_SPEED_Q13;
  if (lead < -LEAD_DOWN_SPEED_Q13) lead = -LEAD_DOWN_SPEED_Q13;
  const int16_t base = static_cast<int16_t>(speed + lead);

  const int16_t perSpeedQ14 =
      static_cast<int16_t>(product(steering.curvaturePerMQ8, HALF_TRACK_M_Q14) >> CURVATURE_BITS);
  static_assert(TRACK_BITS == 14, "times four, a high word");
  const int16_t half = highProduct(static_cast<int16_t>(speed * 4), perSpeedQ14);
  int16_t left = static_cast<int16_t>(base - half);
  int16_t right = static_cast<int16_t>(base + half);
  const int16_t outer = left > right ? left : right;
  if (outer > FULL_SPEED_Q13) {
    const int16_t beyond = static_cast<int16_t>(outer - FULL_SPEED_Q13);
    left = clamped(static_cast<int16_t>(left - beyond), FULL_SPEED_Q13);
    right = clamped(static_cast<int16_t>(right - beyond), FULL_SPEED_Q13);
  }
  left = clamped(left, FULL_SPEED_Q13);
  right = clamped(right, FULL_SPEED_Q13);

  // Twice the difference with 13 bits.
  lag = static_cast<int16_t>(left + right - 2 * speed);
  steering.dutyLeftQ12 = dutyFor(left, START_DUTY_LEFT_Q12, DUTY_LEFT_PER_SPEED_Q14);
  steering.dutyRightQ12 = dutyFor(right, START_DUTY_RIGHT_Q12, DUTY_RIGHT_PER_SPEED_Q14);
}

}  // namespace

void startSteering() {
  resetSensing();
  steering = Steering();
  filtered = demand = held = travelled = release = corner = 0;
  bend = lag = 0;
  searched = 0;
  side = cornerSide = 1;
  speedClass = SPEED_CLASSES;
}

void advance() {
  if (steering.phase == Phase::Stopped) return;
  if (steering.phase == Phase::Follow) filter(held, steering.curvaturePerMQ8, HOLD_FILTER_Q15);
  // 14 bits times a coefficient with 15: 29 bits.
  addProduct(steering.speedQ29, lag, MOTOR_STEP_Q15);
  if (steering.speedQ29 < 0) steering.speedQ29 = 0;
}

uint8_t classInForce() {
  return static_cast<uint8_t>(speedClass - SPEED_CLASSES);
}

const Steering& steer() {
  if (steering.phase == Phase::Stopped) return steering;
  const Sight& sight = findLine();
  const Phase before = steering.phase;
  updatePhase(sight);
  if (steering.phase == Phase::Stopped) {
    steering.dutyLeftQ12 = steering.dutyRightQ12 = 0;
    steering.speedQ29 = 0;
    return steering;
  }
  if (steering.phase == Phase::Follow) {
    follow(sight.offsetMmQ6, before != Phase::Follow);
  } else if (steering.phase == Phase::Search) {
    steering.curvaturePerMQ8 = static_cast<int16_t>(side * SEARCH_CURVATURE_PER_M_Q8);
  } else {
    steering.curvaturePerMQ8 = wholeOf(held);
  }
  followBend();
  drive();
  return steering;
}
