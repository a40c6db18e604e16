// Part of the firmware of bench-cart. Written by fairlead 0.1.0; change the build sheet, not
// this file.
//
// The motor driver.
#pragma once

#include <stdint.h>

// Makes the driver's pins outputs, all off.
void setupMotors();

// Drives the wheels: -FULL_DUTY_Q12 to FULL_DUTY_Q12, positive forward.
void setMotors(int16_t leftQ12, int16_t rightQ12);

// No current to either motor: the wheels run out.
void motorsOff();
