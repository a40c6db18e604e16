// Part of the firmware of seed_cart. Written by fairlead 0.1.0; change the build sheet, not
// this file.
// What runs in each sample is compiled for speed, not for size.
#pragma GCC optimize("O2")

#include "board.h"

#include <avr/interrupt.h>
#include <avr/wdt.h>
#include <util/atomic.h>

#include "constants.h"
#include "pins.h"
#include "sensing.h"

namespace {

// A timer ticks once a sample and starts the converter; its interrupts read one sensor after the
// other. What a reading means is worked out while the next one is converted; the last one makes the
// sample due. A tick before that sample has been dealt with is an overrun.
constexpr uint8_t SELECT[] = {_BV(REFS0) | 0, _BV(REFS0) | 1, _BV(REFS0) | 2, _BV(REFS0) | 3,
                              _BV(REFS0) | 4, _BV(REFS0) | 5, _BV(REFS0) | 6, _BV(REFS0) | 7};
volatile int16_t readings[SENSOR_COUNT];
volatile uint8_t scanned = SENSOR_COUNT;  // readings that are there
volatile uint8_t taken = SENSOR_COUNT;    // readings that have been worked on
volatile bool pending;                    // a sample is due or being dealt with
bool working;
int16_t counts[SENSOR_COUNT];  // readings of the present sample
volatile uint16_t overrunCount;
bool buttonDown = true;
uint8_t buttonDiffers;

// The core's clock counts with an interrupt each 1024 us. It waits, less than that, while the
// motors wait for a sample.
inline void holdClock() {
  TIMSK0 = static_cast<uint8_t>(TIMSK0 & ~_BV(TOIE0));
}

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

void letClockGo() {
  TIMSK0 = static_cast<uint8_t>(TIMSK0 | _BV(TOIE0));
}

ISR(TIMER2_COMPA_vect) {
  if (pending) {
    if (overrunCount < UINT16_MAX) overrunCount = overrunCount + 1;
    return;
  }
  pending = true;
  taken = 0;
  scanned = 0;
  ADMUX = SELECT[0];
  ADCSRA |= _BV(ADSC);
}

ISR(ADC_vect) {
  const uint8_t i = scanned;
  readings[i] = static_cast<int16_t>(ADC);
  scanned = static_cast<uint8_t>(i + 1);
  if (i + 1 < SENSOR_COUNT) {
    ADMUX = SELECT[i + 1];
    ADCSRA |= _BV(ADSC);
  } else {
    holdClock();
  }
}

void setupBoard() {
  pinMode(BUTTON_PIN, INPUT_PULLUP);
  // Converter clock 16 MHz / 32 = 500 kHz, good to 2.9 counts, where 12.1 are allowed. From
  // sensors.
  ADCSRA = _BV(ADEN) | _BV(ADIE) | _BV(ADPS2) | _BV(ADPS0);
  TCCR2A = _BV(WGM21);
  TCCR2B = _BV(CS22) | _BV(CS21);
  OCR2A = 124;
  TCNT2 = 0;
  TIMSK2 = _BV(OCIE2A);
}

bool sampleDue() {
  if (working) {
    working = false;
    pending = false;
    letClockGo();
  }
  if (!pending) return false;
  uint8_t next = taken;
  while (next < scanned) {
    counts[next] = readings[next];
    takeReading(next, readings[next]);
    next++;
    taken = next;
  }
  working = next == SENSOR_COUNT;
  return working;
}

uint16_t overruns() {
  uint16_t count;
  ATOMIC_BLOCK(ATOMIC_RESTORESTATE) {
    count = overrunCount;
  }
  return count;
}

void startOverruns() {
  ATOMIC_BLOCK(ATOMIC_RESTORESTATE) {
    overrunCount = 0;
  }
}

const int16_t (&sensorReadings()) [SENSOR_COUNT] { return counts; }

bool buttonPressed() {
  const bool down = bit_is_clear(PIND, 2);
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
