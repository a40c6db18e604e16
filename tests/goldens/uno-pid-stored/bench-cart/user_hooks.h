// Yours: code of your own for bench-cart. fairlead wrote this file once and leaves it alone.
// The firmware calls these functions; fill them in user_hooks.cpp. Keep them short and never wait
// in them: reading, steering and hooks share one sample period (SAMPLE_PERIOD_US). steering.h tells
// the speed class in force, supervisor.h the state and the last reason.
#pragma once

#include "constants.h"
#include "steering.h"
#include "supervisor.h"

// Once, at the end of setup(), motors off.
void userSetup();

// At the end of every sample of a run.
void userSample(const Steering& steering);

// When a run has ended, motors off.
void userStopped(Reason reason);
