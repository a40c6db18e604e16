// Part of the firmware of seed_cart. Written by fairlead 0.1.0; change the build sheet, not
// this file.
#include "board.h"

#include <avr/wdt.h>

#include "pins.h"

namespace {

uint32_t sampleBeganUs;
uint16_t overrunCount;
bool buttonDown = true;
uint8_t buttonDiffers;

// Set before main() and therefore not to be cleared by it.
uint8_t resetFlags __attribute__((section(".noinit")));

}  // namespace

// After a watchdog reset the watchdog runs on with its shortest time (data sheet, Watchdog Timer).
// It is switched off before main(), or it would strike again before setup(). A boot loader may have
// cleared the flags already; the cause then reads as normal.
void keepResetFlags() __attribute__((naked, used, section(".init3")));
void keepResetFlags() {
  resetFlags = MCUSR;
  MCUSR = 0;
  wdt_disable();
}

void setupBoard() {
  pinMode(BUTTON_PIN, INPUT_PULLUP);
  // Converter clock 16 MHz / 32 = 500 kHz: 26 us a reading instead of 104 us. Beyond the 200 kHz
  // for full resolution (data sheet, ADC prescaling) about 9 of its 10 bits are good: enough here.
  ADCSRA = static_cast<uint8_t>((ADCSRA & ~(_BV(ADPS2) | _BV(ADPS1) | _BV(ADPS0))) | _BV(ADPS2) |
                                _BV(ADPS0));
  sampleBeganUs = micros();
}

bool sampleDue() {
  const uint32_t nowUs = micros();
  if (nowUs - sampleBeganUs < SAMPLE_PERIOD_US) return false;
  sampleBeganUs += SAMPLE_PERIOD_US;
  if (nowUs - sampleBeganUs >= SAMPLE_PERIOD_US) {
    sampleBeganUs = nowUs;
    if (overrunCount < UINT16_MAX) overrunCount++;
  }
  return true;
}

uint16_t overruns() {
  return overrunCount;
}

void startOverruns() {
  overrunCount = 0;
}

void readSensors(int16_t (&counts)[SENSOR_COUNT]) {
  for (uint8_t i = 0; i < SENSOR_COUNT; i++) {
    counts[i] = static_cast<int16_t>(analogRead(SENSOR_PINS[i]));
  }
}

bool buttonPressed() {
  const bool down = digitalRead(BUTTON_PIN) == LOW;
  if (down == buttonDown) {
    buttonDiffers = 0;
    return false;
  }
  buttonDiffers++;
  if (buttonDiffers < DEBOUNCE_SAMPLES) return false;
  buttonDiffers = 0;
  buttonDown = down;
  return down;
}

ResetCause resetCause() {
  if (resetFlags & _BV(WDRF)) return ResetCause::Watchdog;
  // Switching on may look like a brown-out as well.
  if ((resetFlags & _BV(BORF)) && !(resetFlags & _BV(PORF))) return ResetCause::BrownOut;
  return ResetCause::Normal;
}
