// Part of the firmware of seed_cart. Written by fairlead 0.1.0; change the build sheet, not
// this file.
//
// The direction pin gives the side, PWM the speed. Most drivers of this kind brake while PWM is
// low.
// What runs in each sample is compiled for speed, not for size.
#pragma GCC optimize("O2")

#include "motors.h"

#include <avr/io.h>
#include <util/atomic.h>

#include "arithmetic.h"
#include "pins.h"

namespace {

constexpr uint8_t DUTY_BITS = 12;
static_assert(FULL_DUTY_Q12 == 1 << DUTY_BITS, "duty to PWM by a shift");

constexpr uint8_t MOTOR_PINS[] = {
    LEFT_PWM_PIN,
    LEFT_DIR_PIN,
    RIGHT_PWM_PIN,
    RIGHT_DIR_PIN,
};

// PWM value at full duty.
constexpr int16_t LeftPwmTop = 400;

// Off is the pin's own low level: then not even a short pulse is left.
inline void setLeftPwm(int16_t value) {
  if (value == 0) {
    TCCR1A = static_cast<uint8_t>(TCCR1A & ~_BV(COM1A1));
    return;
  }
  OCR1A = static_cast<uint16_t>(value);
  TCCR1A = static_cast<uint8_t>(TCCR1A | _BV(COM1A1));
}

// PWM value at full duty.
constexpr int16_t RightPwmTop = 400;

// Off is the pin's own low level: then not even a short pulse is left.
inline void setRightPwm(int16_t value) {
  if (value == 0) {
    TCCR1A = static_cast<uint8_t>(TCCR1A & ~_BV(COM1B1));
    return;
  }
  OCR1B = static_cast<uint16_t>(value);
  TCCR1A = static_cast<uint8_t>(TCCR1A | _BV(COM1B1));
}

inline void setLeftDir(bool high) {
  if (high) {
    PORTB = static_cast<uint8_t>(PORTB | _BV(4));
  } else {
    PORTB = static_cast<uint8_t>(PORTB & ~_BV(4));
  }
}

inline void setRightDir(bool high) {
  if (high) {
    PORTB = static_cast<uint8_t>(PORTB | _BV(5));
  } else {
    PORTB = static_cast<uint8_t>(PORTB & ~_BV(5));
  }
}

int16_t sizeOf(int16_t dutyQ12) {
  return dutyQ12 < 0 ? static_cast<int16_t>(-dutyQ12) : dutyQ12;
}

// PWM value of a duty without its sign.
inline int16_t pwmOf(int16_t sizeQ12, int16_t top) {
  return highProduct(sizeQ12, static_cast<int16_t>(top * (1 << (16 - DUTY_BITS))));
}

}  // namespace

void setupMotors() {
  for (const uint8_t pin : MOTOR_PINS) {
    digitalWrite(pin, LOW);
    pinMode(pin, OUTPUT);
  }
  // PWM of 20 kHz: above hearing. From drive.driver.
  TCCR1A = _BV(WGM11);
  TCCR1B = _BV(WGM13) | _BV(CS10);
  ICR1 = 400;
}

// All outputs are written at once: no interrupt comes between the wheels.
void setMotors(int16_t leftQ12, int16_t rightQ12) {
  const int16_t left = sizeOf(leftQ12);
  const int16_t right = sizeOf(rightQ12);
  const int16_t leftPwm = pwmOf(left, LeftPwmTop);
  const int16_t rightPwm = pwmOf(right, RightPwmTop);
  ATOMIC_BLOCK(ATOMIC_RESTORESTATE) {
    setLeftDir((leftQ12 >= 0) == (LEFT_FORWARD_LEVEL == HIGH));
    setRightDir((rightQ12 >= 0) == (RIGHT_FORWARD_LEVEL == HIGH));
    setLeftPwm(leftPwm);
    setRightPwm(rightPwm);
  }
}

void motorsOff() {
  ATOMIC_BLOCK(ATOMIC_RESTORESTATE) {
    setLeftPwm(0);
    setRightPwm(0);
    setLeftDir(false);
    setRightDir(false);
  }
}
