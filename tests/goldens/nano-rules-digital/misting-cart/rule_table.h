// Part of the firmware of misting-cart. Written by fairlead 0.1.0; change the build sheet, not
// this file.
//
// What the wheels do for each run of sensors on the line, from the first to the last of them.
// Between runs of several sensors the widest counts; sensing.cpp reduces every state of the bar to
// one run. Wheel speeds are fractions of the base speed, FRACTION_BITS bits. From control.kind.
#pragma once

#include <avr/pgmspace.h>
#include <stdint.h>

#include "constants.h"

struct RuleAction {
  int8_t left;
  int8_t right;
};

// Runs in order of their first, then their last sensor; in flash memory.
constexpr RuleAction RULE_TABLE[] PROGMEM = {
    {24, 104},  // sensor 1
    {37, 91},   // sensors 1 to 2
    {51, 77},   // sensors 1 to 3
    {65, 63},   // sensors 1 to 4
    {78, 50},   // sensors 1 to 5
    {64, 64},   // sensors 1 to 6
    {44, 84},   // sensor 2
    {51, 77},   // sensors 2 to 3
    {57, 71},   // sensors 2 to 4
    {64, 64},   // sensors 2 to 5
    {50, 78},   // sensors 2 to 6
    {57, 71},   // sensor 3
    {64, 64},   // sensors 3 to 4
    {71, 57},   // sensors 3 to 5
    {63, 65},   // sensors 3 to 6
    {71, 57},   // sensor 4
    {77, 51},   // sensors 4 to 5
    {77, 51},   // sensors 4 to 6
    {84, 44},   // sensor 5
    {91, 37},   // sensors 5 to 6
    {104, 24},  // sensor 6
};
static_assert(entriesOf(RULE_TABLE) == SENSOR_COUNT * (SENSOR_COUNT + 1) / 2,
              "one action for each run");

// Place of a first sensor's runs, less its own number: the last sensor's leads on from there.
constexpr uint8_t RULE_ROWS[] = {0, 5, 9, 12, 14, 15};
static_assert(entriesOf(RULE_ROWS) == SENSOR_COUNT, "one place for each sensor");

inline RuleAction actionFor(uint8_t first, uint8_t last) {
  const RuleAction& action = RULE_TABLE[static_cast<uint8_t>(RULE_ROWS[first] + last)];
  return {static_cast<int8_t>(pgm_read_byte(&action.left)),
          static_cast<int8_t>(pgm_read_byte(&action.right))};
}
