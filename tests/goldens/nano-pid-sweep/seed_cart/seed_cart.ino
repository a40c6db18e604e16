// seed_cart: firmware of a line-tracking vehicle on Nano (ATmega328P).
// Written by fairlead 0.1.0 from the build sheet with SHA-256
// 92831afa7e95d8865d619ae432df9e5aa007707799fed5b2f0c8417e610c28c2
// Change the sheet and render again; edits here are refused then, not lost. user_hooks is
// yours.
//
// This firmware is no safety function. Where the vehicle could hurt someone, guarding,
// emergency stop and personnel detection are separate, rated equipment under local codes,
// planned by competent, licensed people (driverless industrial trucks: ISO 3691-4; stop
// categories: IEC 60204-1).
// First run: wheels off the floor. Check that both turn forward, and that the button stops
// them.
// Battery: fuse it at its terminal, never short it, stop at its lowest voltage, charge it under
// supervision with a charger made for its cells.
//
// Start: set the vehicle on a straight, the line under the middle of the bar, and press the
// button. After the countdown it turns left and right to measure ground and line, then drives.
// Pressing again stops it.
// Nothing moves without the button, after a reset neither. To go on after a stop, press it
// again.

#include "board.h"
#include "motors.h"
#include "supervisor.h"
#include "user_hooks.h"

void setup() {
  setupMotors();  // before anything else: motors off
  setupBoard();
  setupSupervisor();
  userSetup();
}

void loop() {
  if (sampleDue()) superviseSample();
}
