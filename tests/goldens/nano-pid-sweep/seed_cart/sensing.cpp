// Part of the firmware of seed_cart. Written by fairlead 0.1.0; change the build sheet, not
// this file.
//
// Each reading becomes a coverage, 0 to 256. Neighbouring sensors on the line form a run.
// An edge of the line lies between a covered and an uncovered sensor; the sum of their two
// coverages says where. Two edges give the middle of the line; where one lies outside the bar,
// the other and the line's width do.
#include "sensing.h"

// The arithmetic here and in steering.cpp shifts negative numbers to the right.
static_assert((-1 >> 1) == -1, "shifts to the right keep the sign");

namespace {

constexpr uint8_t LAST = SENSOR_COUNT - 1;
constexpr int32_t SCALED_FULL = int32_t{FULL_COVERAGE_Q8} << CALIBRATION_BITS;
static_assert(SCALED_FULL >> 8 <= INT16_MAX, "a coverage before its last shift, in 16 bits");

int16_t groundCounts[SENSOR_COUNT];
int16_t coveragePerCountQ20[SENSOR_COUNT];
int16_t coverageQ8[SENSOR_COUNT];
Sight sight;
int8_t runReach;  // what middleOf() saw of Sight::reach

// Turns readings into coverages; returns their sum.
int16_t cover(const int16_t (&counts)[SENSOR_COUNT]) {
  int16_t sum = 0;
  for (uint8_t i = 0; i < SENSOR_COUNT; i++) {
    const int16_t aboveGround = static_cast<int16_t>(counts[i] - groundCounts[i]);
    const int32_t scaled = int32_t{aboveGround} * coveragePerCountQ20[i];
    // Limits first, so that the slow shift is one of 16 bits.
    if (scaled < 0) {
      coverageQ8[i] = 0;
    } else if (scaled >= SCALED_FULL) {
      coverageQ8[i] = FULL_COVERAGE_Q8;
    } else {
      coverageQ8[i] = static_cast<int16_t>(scaled >> 8) >> (CALIBRATION_BITS - 8);
    }
    sum = static_cast<int16_t>(sum + coverageQ8[i]);
  }
  return sum;
}

// Place of an edge beside the middle of its gap, by the sum of the coverages on both sides.
int32_t edgeShiftMmQ6(int16_t halfGapMmQ6, int16_t sumQ8) {
  const uint8_t index = static_cast<uint8_t>(sumQ8 >> EDGE_STEP_BITS);
  int32_t value = EDGE_TABLE_Q10[index];
  if (index < EDGE_ENTRIES - 1) {
    const int16_t part = sumQ8 & ((1 << EDGE_STEP_BITS) - 1);
    value += ((EDGE_TABLE_Q10[index + 1] - value) * part) >> EDGE_STEP_BITS;
  }
  return (halfGapMmQ6 * value) >> EDGE_BITS;
}

int16_t sumOf(uint8_t left) {
  return static_cast<int16_t>(coverageQ8[left] + coverageQ8[left + 1]);
}

// Middle of the line whose run of sensors is first to last.
int32_t middleOf(uint8_t first, uint8_t last) {
  runReach = 0;
  int32_t leftEdge = 0;
  int32_t rightEdge = 0;
  if (first > 0) {
    leftEdge = GAP_MIDDLE_MM_Q6[first] +
               edgeShiftMmQ6(GAP_HALF_MM_Q6[first], sumOf(static_cast<uint8_t>(first - 1)));
  }
  if (last < LAST) {
    rightEdge = GAP_MIDDLE_MM_Q6[last + 1] - edgeShiftMmQ6(GAP_HALF_MM_Q6[last + 1], sumOf(last));
  }
  if (first > 0 && last < LAST) return (leftEdge + rightEdge) >> 1;
  if (first > 0) {
    if (leftEdge - GAP_MIDDLE_MM_Q6[SENSOR_COUNT] > CORNER_WIDTH_MM_Q6) runReach = -1;
    return leftEdge - HALF_LINE_MM_Q6;
  }
  if (last < LAST) {
    if (GAP_MIDDLE_MM_Q6[0] - rightEdge > CORNER_WIDTH_MM_Q6) runReach = 1;
    return rightEdge + HALF_LINE_MM_Q6;
  }
  return 0;
}

// No sensor is on the line: one just beyond an end of the bar still partly covers the end sensor.
void findBeyondEnds() {
  const int16_t left = coverageQ8[0];
  const int16_t right = coverageQ8[LAST];
  if (left >= LOW_COVERAGE_Q8 && left >= right) {
    const int16_t sum = static_cast<int16_t>(FULL_COVERAGE_Q8 + left);
    sight.found = true;
    sight.offsetMmQ6 =
        GAP_MIDDLE_MM_Q6[0] - edgeShiftMmQ6(GAP_HALF_MM_Q6[0], sum) + HALF_LINE_MM_Q6;
  } else if (right >= LOW_COVERAGE_Q8) {
    const int16_t sum = static_cast<int16_t>(FULL_COVERAGE_Q8 + right);
    sight.found = true;
    sight.offsetMmQ6 = GAP_MIDDLE_MM_Q6[SENSOR_COUNT] +
                       edgeShiftMmQ6(GAP_HALF_MM_Q6[SENSOR_COUNT], sum) - HALF_LINE_MM_Q6;
  }
}

bool onLine(uint8_t i) {
  return coverageQ8[i] >= HIGH_COVERAGE_Q8;
}

// Of several runs, the one nearest to the last offset is the line.
void takeNearestRun() {
  const int32_t before = sight.offsetMmQ6;
  int32_t nearest = 0;
  uint8_t i = 0;
  while (i < SENSOR_COUNT) {
    if (!onLine(i)) {
      i++;
      continue;
    }
    const uint8_t first = i;
    while (i < SENSOR_COUNT && onLine(i)) i++;
    const int32_t offset = middleOf(first, static_cast<uint8_t>(i - 1));
    const int32_t distance = offset > before ? offset - before : before - offset;
    if (!sight.found || distance < nearest) {
      sight.found = true;
      nearest = distance;
      sight.offsetMmQ6 = offset;
      sight.reach = runReach;
    }
  }
  if (!sight.found) findBeyondEnds();
}

}  // namespace

void resetSensing() {
  sight = Sight();
}

void setCalibration(const int16_t (&ground)[SENSOR_COUNT],
                    const int16_t (&coveragePerCount)[SENSOR_COUNT]) {
  for (uint8_t i = 0; i < SENSOR_COUNT; i++) {
    groundCounts[i] = ground[i];
    coveragePerCountQ20[i] = coveragePerCount[i];
  }
}

const Sight& findLine(const int16_t (&counts)[SENSOR_COUNT]) {
  const int16_t sum = cover(counts);
  sight.found = false;
  sight.reach = 0;
  sight.wide = sum >= WIDE_COVERAGE_Q8;
  if (sight.wide) return sight;
  takeNearestRun();
  return sight;
}
