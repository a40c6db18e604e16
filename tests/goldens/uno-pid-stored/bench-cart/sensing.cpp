// Part of the firmware of bench-cart. Written by fairlead 0.1.0; change the build sheet, not
// this file.
//
// Each reading becomes a coverage, 0 to 255. Neighbouring sensors on the line form a run.
// An edge of the line lies between a covered and an uncovered sensor; the sum of their two
// coverages says where. Two edges give the middle of the line; where one lies outside the bar,
// the other and the line's width do.
// What runs in each sample is compiled for speed, not for size.
#pragma GCC optimize("O2")

#include "sensing.h"

#include "arithmetic.h"
#include "constants.h"

// The arithmetic here and in steering.cpp shifts negative numbers to the right.
static_assert((-1 >> 1) == -1, "shifts to the right keep the sign");

namespace {

constexpr uint8_t LAST = SENSOR_COUNT - 1;
// Readings are shifted so far that a coverage is the high word of a product.
constexpr int16_t COUNT_FACTOR = 1 << (16 - CALIBRATION_BITS);
static_assert(1023L * COUNT_FACTOR <= INT16_MAX, "a shifted reading, in 16 bits");

uint8_t coverage[SENSOR_COUNT];
int16_t coverageSum;
using SensorBits = uint8_t;
static_assert(SENSOR_COUNT <= 8 * sizeof(SensorBits), "a bit for each sensor");
SensorBits onLine;  // sensors on the line; bit 0 is the leftmost
SensorBits bit;     // of the next sensor
Sight sight;
uint8_t lineFirst;  // the run of sensors taken for the line
uint8_t lineLast;

}  // namespace

void takeReading(uint8_t i, int16_t count) {
  if (i == 0) {
    bit = 1;
    onLine = 0;
    coverageSum = 0;
  }
  const int16_t above = static_cast<int16_t>((count - GROUND_COUNTS[i]) * COUNT_FACTOR);
  const int16_t graded = highProduct(above, COVERAGE_255THS_PER_COUNT_Q12[i]);
  uint8_t value = static_cast<uint8_t>(graded);
  if (graded < 0) value = 0;
  if (graded > FULL_COVERAGE_255THS) value = FULL_COVERAGE_255THS;
  const bool on = value >= HIGH_COVERAGE_255THS;
  coverage[i] = value;
  coverageSum = static_cast<int16_t>(coverageSum + value);
  if (on) {
    onLine = static_cast<SensorBits>(onLine | bit);
  }
  bit = static_cast<SensorBits>(bit + bit);
}

namespace {

// Place of an edge beside the middle of its gap, by the sum of the coverages on both sides.
int16_t edgeShiftMmQ6(int16_t halfGapMmQ9, uint16_t sum255ths) {
  // An entry stands for just one full coverage: an edge in the middle. Its bits are the high byte.
  const uint16_t place = static_cast<uint16_t>((sum255ths + 1) << (8 - EDGE_STEP_BITS));
  const int16_t* const entry = EDGE_TABLE_Q12 + (place >> 8);
  const uint8_t part = static_cast<uint8_t>(place);
  const int16_t step = static_cast<int16_t>(entry[1] - entry[0]);
  // (step * part) >> 8, by bytes
  const int16_t high = static_cast<int16_t>(static_cast<int8_t>(step >> 8) * part);
  const uint8_t low = static_cast<uint8_t>((static_cast<uint8_t>(step) * part) >> 8);
  const int16_t value = static_cast<int16_t>(entry[0] + high + low);
  return highWord(product(value, halfGapMmQ9) * 2);
}
static_assert(EDGE_BITS + GAP_HALF_BITS == 15, "doubled, a high word");

uint16_t sumOf(uint8_t left) {
  return static_cast<uint16_t>(coverage[left] + coverage[left + 1]);
}

// (a + b) >> 1, which itself may need a bit more than there are.
inline int16_t meanOf(int16_t a, int16_t b) {
  return static_cast<int16_t>((a >> 1) + (b >> 1) + (a & b & 1));
}

// Takes the run of sensors first to last for the line.
void measure(uint8_t first, uint8_t last) {
  int16_t leftEdge = 0;
  int16_t rightEdge = 0;
  if (first > 0) {
    leftEdge = GAP_MIDDLE_MM_Q6[first];
    leftEdge = static_cast<int16_t>(
        leftEdge + edgeShiftMmQ6(GAP_HALF_MM_Q9[first], sumOf(static_cast<uint8_t>(first - 1))));
  }
  if (last < LAST) {
    rightEdge = GAP_MIDDLE_MM_Q6[last + 1];
    rightEdge =
        static_cast<int16_t>(rightEdge - edgeShiftMmQ6(GAP_HALF_MM_Q9[last + 1], sumOf(last)));
  }
  if (first > 0 && last < LAST) {
    sight.offsetMmQ6 = meanOf(leftEdge, rightEdge);
  } else if (first > 0) {
    if (static_cast<int32_t>(leftEdge) - GAP_MIDDLE_MM_Q6[SENSOR_COUNT] > CORNER_WIDTH_MM_Q6)
      sight.reach = -1;
    sight.offsetMmQ6 = static_cast<int16_t>(leftEdge - HALF_LINE_MM_Q6);
  } else if (last < LAST) {
    if (static_cast<int32_t>(GAP_MIDDLE_MM_Q6[0]) - rightEdge > CORNER_WIDTH_MM_Q6) sight.reach = 1;
    sight.offsetMmQ6 = static_cast<int16_t>(rightEdge + HALF_LINE_MM_Q6);
  } else {
    sight.offsetMmQ6 = 0;
  }
}

// No sensor is on the line: one just beyond an end of the bar still partly covers the end sensor.
void findBeyondEnds() {
  const uint8_t left = coverage[0];
  const uint8_t right = coverage[LAST];
  if (left >= LOW_COVERAGE_255THS && left >= right) {
    const uint16_t sum = static_cast<uint16_t>(FULL_COVERAGE_255THS + left);
    const int16_t shift = edgeShiftMmQ6(GAP_HALF_MM_Q9[0], sum);
    sight.found = true;
    sight.offsetMmQ6 = static_cast<int16_t>(GAP_MIDDLE_MM_Q6[0] - shift + HALF_LINE_MM_Q6);
  } else if (right >= LOW_COVERAGE_255THS) {
    const uint16_t sum = static_cast<uint16_t>(FULL_COVERAGE_255THS + right);
    const int16_t shift = edgeShiftMmQ6(GAP_HALF_MM_Q9[SENSOR_COUNT], sum);
    sight.found = true;
    sight.offsetMmQ6 =
        static_cast<int16_t>(GAP_MIDDLE_MM_Q6[SENSOR_COUNT] + shift - HALF_LINE_MM_Q6);
  }
}

// How far a run lies from the last offset, by the middles of its gaps.
uint16_t distanceOf(uint8_t first, uint8_t last) {
  const int16_t leftEdge = GAP_MIDDLE_MM_Q6[first];
  const int16_t rightEdge = GAP_MIDDLE_MM_Q6[last + 1];
  int16_t middle = meanOf(leftEdge, rightEdge);
  if (first == 0) {
    middle = static_cast<int16_t>(rightEdge + HALF_LINE_MM_Q6);
  } else if (last == LAST) {
    middle = static_cast<int16_t>(leftEdge - HALF_LINE_MM_Q6);
  }
  // Two 16-bit numbers may lie further apart than a signed one holds.
  const uint16_t unsignedMiddle = static_cast<uint16_t>(middle);
  const uint16_t before = static_cast<uint16_t>(sight.offsetMmQ6);
  return static_cast<uint16_t>(middle > sight.offsetMmQ6 ? unsignedMiddle - before
                                                         : before - unsignedMiddle);
}

// Of several runs, the one nearest to the last offset is the line.
void takeNearestRun() {
  uint16_t nearest = 0;
  uint8_t i = 0;
  for (SensorBits rest = onLine; rest != 0;) {
    for (; (rest & 1) == 0; rest = static_cast<SensorBits>(rest >> 1)) i++;
    const uint8_t first = i;
    for (; (rest & 1) != 0; rest = static_cast<SensorBits>(rest >> 1)) i++;
    const uint8_t last = static_cast<uint8_t>(i - 1);
    // The only run, most often, needs no distance.
    if (sight.found) {
      if (nearest == 0) nearest = distanceOf(lineFirst, lineLast);
      const uint16_t distance = distanceOf(first, last);
      if (distance >= nearest) continue;
      nearest = distance;
    }
    sight.found = true;
    lineFirst = first;
    lineLast = last;
  }
  if (sight.found) {
    measure(lineFirst, lineLast);
  } else {
    findBeyondEnds();
  }
}

}  // namespace

void resetSensing() {
  sight = Sight();
}

const Sight& findLine() {
  sight.found = false;
  sight.reach = 0;
  sight.wide = coverageSum >= WIDE_COVERAGE_255THS;
  if (sight.wide) return sight;
  takeNearestRun();
  return sight;
}
