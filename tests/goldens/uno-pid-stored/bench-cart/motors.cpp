// Part of the firmware of bench-cart. Written by fairlead 0.1.0; change the build sheet, not
// this file.
//
// The two direction inputs give the side, PWM the speed. Most drivers of this kind brake while PWM
// is low, which keeps slow driving even.
#include "motors.h"

#include "pins.h"

namespace {

constexpr uint8_t FULL_PWM = 255;  // of analogWrite()
constexpr uint8_t DUTY_BITS = 12;
static_assert(FULL_DUTY_Q12 == 1 << DUTY_BITS, "duty to PWM by a shift");

constexpr uint8_t MOTOR_PINS[] = {
    LEFT_PWM_PIN,  LEFT_FORWARD_PIN,  LEFT_BACKWARD_PIN,
    RIGHT_PWM_PIN, RIGHT_FORWARD_PIN, RIGHT_BACKWARD_PIN,
};

void setMotor(uint8_t pwmPin, uint8_t forwardPin, uint8_t backwardPin, int16_t dutyQ12) {
  const bool forward = dutyQ12 >= 0;
  const int32_t size = forward ? dutyQ12 : -int32_t{dutyQ12};
  digitalWrite(forwardPin, forward);
  digitalWrite(backwardPin, !forward);
  analogWrite(pwmPin, static_cast<int>((size * FULL_PWM) >> DUTY_BITS));
}

}  // namespace

void setupMotors() {
  for (const uint8_t pin : MOTOR_PINS) {
    digitalWrite(pin, LOW);
    pinMode(pin, OUTPUT);
  }
}

void setMotors(int16_t leftQ12, int16_t rightQ12) {
  setMotor(LEFT_PWM_PIN, LEFT_FORWARD_PIN, LEFT_BACKWARD_PIN, leftQ12);
  setMotor(RIGHT_PWM_PIN, RIGHT_FORWARD_PIN, RIGHT_BACKWARD_PIN, rightQ12);
}

void motorsOff() {
  for (const uint8_t pin : MOTOR_PINS) digitalWrite(pin, LOW);
}
