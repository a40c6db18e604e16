// Part of the firmware of misting-cart. Written by fairlead 0.1.0; change the build sheet, not
// this file.
//
// Each reading becomes a coverage, 0 to 255. Neighbouring sensors on the line form a run.
// An edge of the line lies half way between a covered and an uncovered sensor. Two edges give the
// middle of the line; where one lies outside the bar, the other and the line's width do.
// What runs in each sample is compiled for speed, not for size.
#pragma GCC optimize("O2")

#include "sensing.h"

#include "constants.h"

// The arithmetic here and in steering.cpp shifts negative numbers to the right.
static_assert((-1 >> 1) == -1, "shifts to the right keep the sign");

namespace {

constexpr uint8_t LAST = SENSOR_COUNT - 1;

using SensorBits = uint8_t;
static_assert(SENSOR_COUNT <= 8 * sizeof(SensorBits), "a bit for each sensor");
SensorBits onLine;  // sensors on the line; bit 0 is the leftmost
SensorBits bit;     // of the next sensor
Sight sight;

}  // namespace

void takeReading(uint8_t i, int16_t count) {
  if (i == 0) {
    bit = 1;
    onLine = 0;
  }
  const bool on = count == LINE_LEVEL;
  if (on) {
    onLine = static_cast<SensorBits>(onLine | bit);
  }
  bit = static_cast<SensorBits>(bit + bit);
}

namespace {

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
  }
  if (last < LAST) {
    rightEdge = GAP_MIDDLE_MM_Q6[last + 1];
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

// Of several runs the widest is the line; between equally wide ones, the span of all of them.
void takeWidestRun() {
  uint8_t widest = 0;
  uint8_t i = 0;
  for (SensorBits rest = onLine; rest != 0;) {
    for (; (rest & 1) == 0; rest = static_cast<SensorBits>(rest >> 1)) i++;
    const uint8_t first = i;
    for (; (rest & 1) != 0; rest = static_cast<SensorBits>(rest >> 1)) i++;
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
  if (sight.found) measure(sight.first, sight.last);
}

}  // namespace

void resetSensing() {
  sight = Sight();
}

const Sight& findLine() {
  sight.found = false;
  sight.reach = 0;
  takeWidestRun();
  return sight;
}
