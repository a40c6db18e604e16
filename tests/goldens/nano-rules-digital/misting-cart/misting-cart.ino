// misting-cart: firmware of a line-tracking vehicle on Nano (ATmega328P).
// Written by fairlead 0.1.0 from the build sheet with SHA-256
// d75009574a7881c4f6e66d199b2d8bec5e065e80352b5ae976e006788927f61a
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
// Start: set the vehicle on the line and press the button. After the countdown it drives.
// Pressing again stops it.
// Nothing moves without the button, after a reset neither. To go on after a stop, press it
// again.
//
// LED: on while driving, flashing without a pause during the countdown, else a number of
// flashes:
// 1 flash: ready
// 2 flashes: stopped by the button
// 3 flashes: the line was lost and the search did not find it
// 4 flashes: the run limit was reached
// 5 flashes: the control loop missed its period too often
// 6 flashes: restarted by the watchdog after the program hung
// 7 flashes: restarted after the supply voltage broke down

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
