// Part of the firmware of bench-cart. Written by fairlead 0.1.0; change the build sheet, not
// this file.
//
// The two direction inputs give the side, PWM the speed. Most drivers of this kind brake while PWM
// is low, which keeps slow driving even.
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
    LEFT_PWM_PIN,  LEFT_FORWARD_PIN,  LEFT_BACKWARD_PIN,
    RIGHT_PWM_PIN, RIGHT_FORWARD_PIN, RIGHT_BACKWARD_PIN,
};

// PWM value at full duty.
constexpr int16_t LeftPwmTop = 256;

// Off is the pin's own low level: then not even a short pulse is left.
inline void setLeftPwm(int16_t value) {
  if (value == 0) {
    TCCR0A = static_cast<uint8_t>(TCCR0A & ~_BV(COM0B1));
    return;
  }
  OCR0B = static_cast<uint8_t>(value - 1);  // fast PWM puts out one step more
  TCCR0A = static_cast<uint8_t>(TCCR0A | _BV(COM0B1));
}

// PWM value at full duty.
constexpr int16_t RightPwmTop = 256;

// Off is the pin's own low level: then not even a short pulse is left.
inline void setRightPwm(int16_t value) {
  if (value == 0) {
    TCCR0A = static_cast<uint8_t>(TCCR0A & ~_BV(COM0A1));
    return;
  }
  OCR0A = static_cast<uint8_t>(value - 1);  // fast PWM puts out one step more
  TCCR0A = static_cast<uint8_t>(TCCR0A | _BV(COM0A1));
}

inline void setLeftForward(bool high) {
  if (high) {
    PORTD = static_cast<uint8_t>(PORTD | _BV(7));
  } else {
    PORTD = static_cast<uint8_t>(PORTD & ~_BV(7));
  }
}

inline void setLeftBackward(bool high) {
  if (high) {
    PORTB = static_cast<uint8_t>(PORTB | _BV(0));
  } else {
    PORTB = static_cast<uint8_t>(PORTB & ~_BV(0));
  }
}

inline void setRightForward(bool high) {
  if (high) {
    PORTB = static_cast<uint8_t>(PORTB | _BV(1));
  } else {
    PORTB = static_cast<uint8_t>(PORTB & ~_BV(1));
  }
}

inline void setRightBackward(bool high) {
  if (high) {
    PORTB = static_cast<uint8_t>(PORTB | _BV(2));
  } else {
    PORTB = static_cast<uint8_t>(PORTB & ~_BV(2));
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
  // PWM of 976.6 Hz: timer 0 keeps the clock and its frequency. From drive.driver.
}

// All outputs are written at once: no interrupt comes between the wheels.
void setMotors(int16_t leftQ12, int16_t rightQ12) {
  const int16_t left = sizeOf(leftQ12);
  const int16_t right = sizeOf(rightQ12);
  const int16_t leftPwm = pwmOf(left, LeftPwmTop);
  const int16_t rightPwm = pwmOf(right, RightPwmTop);
  ATOMIC_BLOCK(ATOMIC_RESTORESTATE) {
    setLeftForward(leftQ12 >= 0);
    setLeftBackward(leftQ12 < 0);
    setRightForward(rightQ12 >= 0);
    setRightBackward(rightQ12 < 0);
    setLeftPwm(leftPwm);
    setRightPwm(rightPwm);
  }
}

void motorsOff() {
  ATOMIC_BLOCK(ATOMIC_RESTORESTATE) {
    setLeftPwm(0);
    setRightPwm(0);
    setLeftForward(false);
    setLeftBackward(false);
    setRightForward(false);
    setRightBackward(false);
  }
}
