// Part of the firmware of seed_cart. Written by fairlead 0.1.0; change the build sheet, not
// this file.
//
// Which pin does what.
#pragma once

#include <Arduino.h>

#include "constants.h"

// Sensors, the leftmost first. From sensors.pins.
constexpr uint8_t SENSOR_PINS[] = {A0, A1, A2, A3, A4, A5, A6, A7};
static_assert(entriesOf(SENSOR_PINS) == SENSOR_COUNT, "one pin for each sensor");

// Speed of the left motor. From drive.driver.left.pwm.
constexpr uint8_t LEFT_PWM_PIN = 9;

// Direction of the left motor. From drive.driver.left.dir.
constexpr uint8_t LEFT_DIR_PIN = 12;

// Speed of the right motor. From drive.driver.right.pwm.
constexpr uint8_t RIGHT_PWM_PIN = 10;

// Direction of the right motor. From drive.driver.right.dir.
constexpr uint8_t RIGHT_DIR_PIN = 13;

// Start button, to ground, with the internal pull-up. From start.buttonPin.
constexpr uint8_t BUTTON_PIN = 2;

// Level of the direction pin with which the left wheel drives forward. From
// drive.driver.left.inverted.
constexpr uint8_t LEFT_FORWARD_LEVEL = HIGH;

// Level of the direction pin with which the right wheel drives forward. From
// drive.driver.right.inverted.
constexpr uint8_t RIGHT_FORWARD_LEVEL = LOW;
