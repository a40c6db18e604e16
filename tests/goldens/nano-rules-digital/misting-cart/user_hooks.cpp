// Yours: code of your own for misting-cart. fairlead wrote this file once and leaves it alone.
#include "user_hooks.h"

void userSetup() {}

void userSample(const Steering&) {}

void userStopped(Reason) {}
