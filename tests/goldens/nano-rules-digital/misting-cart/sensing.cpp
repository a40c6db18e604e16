// Part of the firmware of misting-cart. Written by fairlead 0.1.0; change the build sheet, not
// this file.
//
// Each reading becomes a coverage, 0 to 256. Neighbouring sensors on the line form a run.
// An edge of the line lies half way between a covered and an uncovered sensor. Two edges give the
// middle of the line; where one lies outside the bar, the other and the line's width do.
#include "sensing.h"

// The arithmetic here and in steering.cpp shifts negative numbers to the right.
static_assert((-1 >> 1) == -1, "shifts to the right keep the sign");

namespace {

constexpr uint8_t LAST = SENSOR_COUNT - 1;

int16_t coverageQ8[SENSOR_COUNT];
Sight sight;
int8_t runReach;  // what middleOf() saw of Sight::reach

// Turns readings into coverages.
void cover(const int16_t (&counts)[SENSOR_COUNT]) {
  for (uint8_t i = 0; i < SENSOR_COUNT; i++) {
    coverageQ8[i] = counts[i] == LINE_LEVEL ? FULL_COVERAGE_Q8 : 0;
  }
}

// Middle of the line whose run of sensors is first to last.
int32_t middleOf(uint8_t first, uint8_t last) {
  runReach = 0;
  int32_t leftEdge = 0;
  int32_t rightEdge = 0;
  if (first > 0) leftEdge = GAP_MIDDLE_MM_Q6[first];
  if (last < LAST) rightEdge = GAP_MIDDLE_MM_Q6[last + 1];
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

bool onLine(uint8_t i) {
  return coverageQ8[i] != 0;
}

// Of several runs the widest is the line; between equally wide ones, the span of all of them.
void takeWidestRun() {
  uint8_t widest = 0;
  uint8_t i = 0;
  while (i < SENSOR_COUNT) {
    if (!onLine(i)) {
      i++;
      continue;
    }
    const uint8_t first = i;
    while (i < SENSOR_COUNT && onLine(i)) i++;
    const uint8_t width = static_cast<uint8_t>(i - first);
    if (width > widest) {
      widest = width;
      sight.first = first;
      sight.last = static_cast<uint8_t>(i - 1);
      sight.found = true;
    } else if (width == widest) {
      sight.last = static_cast<uint8_t>(i - 1);
    }
  }
  if (!sight.found) return;
  sight.offsetMmQ6 = middleOf(sight.first, sight.last);
  sight.reach = runReach;
}

}  // namespace

void resetSensing() {
  sight = Sight();
}

const Sight& findLine(const int16_t (&counts)[SENSOR_COUNT]) {
  cover(counts);
  sight.found = false;
  sight.reach = 0;
  takeWidestRun();
  return sight;
}
