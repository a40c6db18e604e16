// Part of the firmware of bench-cart. Written by fairlead 0.1.0; change the build sheet, not
// this file.
//
// Which pin does what.
#pragma once

#include <Arduino.h>

#include "constants.h"

// Sensors, the leftmost first. From sensors.pins.
constexpr uint8_t SENSOR_PINS[] = {A0, A1, A2, A3, A4, A5};
static_assert(entriesOf(SENSOR_PINS) == SENSOR_COUNT, "one pin for each sensor");

// Speed of the left motor. From drive.driver.left.pwm.
constexpr uint8_t LEFT_PWM_PIN = 5;

// Input that drives the left wheel forward. From drive.driver.left.in1.
constexpr uint8_t LEFT_FORWARD_PIN = 7;

// Input that drives the left wheel backward. From drive.driver.left.in2.
constexpr uint8_t LEFT_BACKWARD_PIN = 8;

// Speed of the right motor. From drive.driver.right.pwm.
constexpr uint8_t RIGHT_PWM_PIN = 6;

// Input that drives the right wheel forward. From drive.driver.right.in1.
constexpr uint8_t RIGHT_FORWARD_PIN = 9;

// Input that drives the right wheel backward. From drive.driver.right.in2.
constexpr uint8_t RIGHT_BACKWARD_PIN = 10;

// Start button, to ground, with the internal pull-up. From start.buttonPin.
constexpr uint8_t BUTTON_PIN = 2;

// The board's own LED.
constexpr uint8_t LED_PIN = LED_BUILTIN;
