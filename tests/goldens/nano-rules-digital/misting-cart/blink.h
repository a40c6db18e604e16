// Part of the firmware of misting-cart. Written by fairlead 0.1.0; change the build sheet, not
// this file.
//
// The LED: what the vehicle is doing, or why it stands still.
#pragma once

void setupBlink();

// One sample period.
void blink();
