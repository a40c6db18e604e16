// Part of the firmware of misting-cart. Written by fairlead 0.1.0; change the build sheet, not
// this file.
//
// The input of the wanted side is held high; the other carries the inverted PWM, so that the motor
// is driven while it is low and braked while it is high (slow decay), which keeps slow driving
// even.
#include "motors.h"

#include "pins.h"

namespace {

constexpr uint8_t FULL_PWM = 255;  // of analogWrite()
constexpr uint8_t DUTY_BITS = 12;
static_assert(FULL_DUTY_Q12 == 1 << DUTY_BITS, "duty to PWM by a shift");

constexpr uint8_t MOTOR_PINS[] = {
    LEFT_FORWARD_PIN,
    LEFT_BACKWARD_PIN,
    RIGHT_FORWARD_PIN,
    RIGHT_BACKWARD_PIN,
};

void setMotor(uint8_t forwardPin, uint8_t backwardPin, int16_t dutyQ12) {
  const bool forward = dutyQ12 >= 0;
  const int32_t size = forward ? dutyQ12 : -int32_t{dutyQ12};
  analogWrite(forward ? forwardPin : backwardPin, FULL_PWM);
  analogWrite(forward ? backwardPin : forwardPin,
              FULL_PWM - static_cast<int>((size * FULL_PWM) >> DUTY_BITS));
}

}  // namespace

void setupMotors() {
  for (const uint8_t pin : MOTOR_PINS) {
    digitalWrite(pin, LOW);
    pinMode(pin, OUTPUT);
  }
}

void setMotors(int16_t leftQ12, int16_t rightQ12) {
  setMotor(LEFT_FORWARD_PIN, LEFT_BACKWARD_PIN, leftQ12);
  setMotor(RIGHT_FORWARD_PIN, RIGHT_BACKWARD_PIN, rightQ12);
}

void motorsOff() {
  for (const uint8_t pin : MOTOR_PINS) digitalWrite(pin, LOW);
}
