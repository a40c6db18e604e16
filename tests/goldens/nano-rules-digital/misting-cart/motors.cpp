// Part of the firmware of misting-cart. Written by fairlead 0.1.0; change the build sheet, not
// this file.
//
// The input of the wanted side is held high; the other carries the inverted PWM, so that the motor
// is driven while it is low and braked while it is high (slow decay), which keeps slow driving
// even.
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
    LEFT_FORWARD_PIN,
    LEFT_BACKWARD_PIN,
    RIGHT_FORWARD_PIN,
    RIGHT_BACKWARD_PIN,
};

// PWM value at full duty.
constexpr int16_t LeftForwardTop = 256;

// Off is the pin's own low level: then not even a short pulse is left.
inline void setLeftForward(int16_t value) {
  if (value == 0) {
    TCCR0A = static_cast<uint8_t>(TCCR0A & ~_BV(COM0B1));
    return;
  }
  OCR0B = static_cast<uint8_t>(value - 1);  // fast PWM puts out one step more
  TCCR0A = static_cast<uint8_t>(TCCR0A | _BV(COM0B1));
}

// PWM value at full duty.
constexpr int16_t LeftBackwardTop = 256;

// Off is the pin's own low level: then not even a short pulse is left.
inline void setLeftBackward(int16_t value) {
  if (value == 0) {
    TCCR0A = static_cast<uint8_t>(TCCR0A & ~_BV(COM0A1));
    return;
  }
  OCR0A = static_cast<uint8_t>(value - 1);  // fast PWM puts out one step more
  TCCR0A = static_cast<uint8_t>(TCCR0A | _BV(COM0A1));
}

// PWM value at full duty.
constexpr int16_t RightForwardTop = 250;

// Off is the pin's own low level: then not even a short pulse is left.
inline void setRightForward(int16_t value) {
  if (value == 0) {
    TCCR1A = static_cast<uint8_t>(TCCR1A & ~_BV(COM1B1));
    return;
  }
  OCR1B = static_cast<uint8_t>(value);
  TCCR1A = static_cast<uint8_t>(TCCR1A | _BV(COM1B1));
}

// PWM value at full duty.
constexpr int16_t RightBackwardTop = 250;

// Off is the pin's own low level: then not even a short pulse is left.
inline void setRightBackward(int16_t value) {
  if (value == 0) {
    TCCR1A = static_cast<uint8_t>(TCCR1A & ~_BV(COM1A1));
    return;
  }
  OCR1A = static_cast<uint8_t>(value);
  TCCR1A = static_cast<uint8_t>(TCCR1A | _BV(COM1A1));
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
  // PWM of 500 Hz and 976.6 Hz: timer 0 keeps the clock and its frequency. From drive.driver.
  TCCR1A = _BV(WGM11);
  TCCR1B = _BV(WGM13) | _BV(CS11) | _BV(CS10);
  ICR1 = 250;
}

// All outputs are written at once: no interrupt comes between the wheels.
void setMotors(int16_t leftQ12, int16_t rightQ12) {
  const int16_t left = sizeOf(leftQ12);
  const int16_t right = sizeOf(rightQ12);
  const bool leftForward = leftQ12 >= 0;
  const bool rightForward = rightQ12 >= 0;
  const int16_t leftForwardPwm =
      static_cast<int16_t>(LeftForwardTop - (leftForward ? 0 : pwmOf(left, LeftForwardTop)));
  const int16_t leftBackwardPwm =
      static_cast<int16_t>(LeftBackwardTop - (leftForward ? pwmOf(left, LeftBackwardTop) : 0));
  const int16_t rightForwardPwm =
      static_cast<int16_t>(RightForwardTop - (rightForward ? 0 : pwmOf(right, RightForwardTop)));
  const int16_t rightBackwardPwm =
      static_cast<int16_t>(RightBackwardTop - (rightForward ? pwmOf(right, RightBackwardTop) : 0));
  ATOMIC_BLOCK(ATOMIC_RESTORESTATE) {
    setLeftForward(leftForwardPwm);
    setLeftBackward(leftBackwardPwm);
    setRightForward(rightForwardPwm);
    setRightBackward(rightBackwardPwm);
  }
}

void motorsOff() {
  ATOMIC_BLOCK(ATOMIC_RESTORESTATE) {
    setLeftForward(0);
    setLeftBackward(0);
    setRightForward(0);
    setRightBackward(0);
  }
}
