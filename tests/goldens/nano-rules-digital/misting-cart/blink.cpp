// Part of the firmware of misting-cart. Written by fairlead 0.1.0; change the build sheet, not
// this file.
#include "blink.h"

#include <Arduino.h>

#include "constants.h"
#include "pins.h"
#include "supervisor.h"

namespace {

constexpr uint8_t PAUSE_TICKS = 6;  // after a code

uint16_t samples;
uint8_t tick;

// Whether the LED is lit in a tick of a number of flashes.
bool litIn(uint8_t flashTick, uint8_t flashes) {
  return flashTick < 2 * flashes && flashTick % 2 == 0;
}

bool code(uint8_t flashes) {
  if (tick >= 2 * flashes + PAUSE_TICKS) tick = 0;
  return litIn(tick, flashes);
}

}  // namespace

void setupBlink() {
  pinMode(LED_PIN, OUTPUT);
}

void blink() {
  samples++;
  if (samples < BLINK_SAMPLES) return;
  samples = 0;
  tick++;
  const State state = currentState();
  bool lit = true;
  if (state == State::Countdown) {
    lit = tick % 2 == 0;
  } else if (!isMoving(state)) {
    lit = code(static_cast<uint8_t>(lastReason()));
  }
  digitalWrite(LED_PIN, lit);
}
