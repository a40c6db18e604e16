// Part of the firmware of seed_cart. Written by fairlead 0.1.0; change the build sheet, not
// this file.
//
// The direction pin gives the side, PWM the speed. Most drivers of this kind brake while PWM is
// low.
#include "motors.h"

#include "pins.h"

namespace {

constexpr uint8_t FULL_PWM = 255;  // of analogWrite()
constexpr uint8_t DUTY_BITS = 12;
static_assert(FULL_DUTY_Q12 == 1 << DUTY_BITS, "duty to PWM by a shift");

constexpr uint8_t MOTOR_PINS[] = {
    LEFT_PWM_PIN,
    LEFT_DIR_PIN,
    RIGHT_PWM_PIN,
    RIGHT_DIR_PIN,
};

void setMotor(uint8_t pwmPin, uint8_t dirPin, uint8_t forwardLevel, int16_t dutyQ12) {
  const bool forward = dutyQ12 >= 0;
  const int32_t size = forward ? dutyQ12 : -int32_t{dutyQ12};
  digitalWrite(dirPin, forward ? forwardLevel : !forwardLevel);
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
  setMotor(LEFT_PWM_PIN, LEFT_DIR_PIN, LEFT_FORWARD_LEVEL, leftQ12);
  setMotor(RIGHT_PWM_PIN, RIGHT_DIR_PIN, RIGHT_FORWARD_LEVEL, rightQ12);
}

void motorsOff() {
  for (const uint8_t pin : MOTOR_PINS) digitalWrite(pin, LOW);
}
