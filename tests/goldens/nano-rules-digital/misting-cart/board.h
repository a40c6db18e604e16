// Part of the firmware of misting-cart. Written by fairlead 0.1.0; change the build sheet, not
// this file.
//
// The board: sample clock, sensors, start button, cause of the last reset.
#pragma once

#include <stdint.h>

void setupBoard();

// Whether a sample is to begin now. A timer of the chip ticks once a period; a tick that finds the
// sample before not yet dealt with counts as an overrun, and no sample begins with it.
bool sampleDue();

// Lets the core's clock count again, which waits from a sample's last reading on: what comes after
// the motors may be interrupted. At the latest the next sampleDue() does so.
void letClockGo();

// Overruns since the last startOverruns().
uint16_t overruns();
void startOverruns();

// Whether the button has just been pressed; to be asked once a sample. A button that is held down
// since the reset does not count until it has been released.
bool buttonPressed();

enum class ResetCause : uint8_t { Normal, Watchdog, BrownOut };
ResetCause resetCause();
