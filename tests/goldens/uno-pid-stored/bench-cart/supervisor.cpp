// Part of the firmware of bench-cart. Written by fairlead 0.1.0; change the build sheet, not
// this file.
//
// The watchdog runs while the vehicle moves: if the program hangs, it resets the board, which
// switches the motors off. After any reset the button has to be pressed again.
// What runs in each sample is compiled for speed, not for size.
#pragma GCC optimize("O2")

#include "supervisor.h"

#include <avr/wdt.h>

#include "blink.h"
#include "board.h"
#include "motors.h"
#include "steering.h"
#include "user_hooks.h"

namespace {

State state = State::Ready;
Reason reason = Reason::Ready;
uint32_t samples;  // in this state

void enter(State next) {
  state = next;
  samples = 0;
}

void stop(State next, Reason why) {
  motorsOff();
  wdt_disable();
  reason = why;
  enter(next);
  userStopped(why);
}

void startRun() {
  startSteering();
  enter(State::Running);
}

void startMoving() {
  startOverruns();
  wdt_enable(WDTO_120MS);
  startRun();
}

void run() {
  const Steering& steering = steer();
  if (steering.phase == Phase::Stopped) {
    stop(State::LineLost, Reason::LineLost);
    return;
  }
  // What can wait comes after the motors.
  setMotors(steering.dutyLeftQ12, steering.dutyRightQ12);
  letClockGo();
  advance();
  samples++;
  if (samples >= RUN_LIMIT_SAMPLES) {
    stop(State::Stopped, Reason::RunLimit);
  } else if (overruns() > OVERRUN_LIMIT) {
    stop(State::Fault, Reason::Overrun);
  } else {
    userSample(steering);
  }
}

void countDown() {
  samples++;
  if (samples >= COUNTDOWN_SAMPLES) startMoving();
}

void takePress() {
  if (state == State::Countdown || isMoving(state)) {
    stop(State::Stopped, Reason::Button);
  } else {
    enter(State::Countdown);
  }
}

}  // namespace

State currentState() {
  return state;
}

Reason lastReason() {
  return reason;
}

void setupSupervisor() {
  setupBlink();
  if (resetCause() == ResetCause::Watchdog) reason = Reason::Watchdog;
  if (resetCause() == ResetCause::BrownOut) reason = Reason::BrownOut;
}

void superviseSample() {
  wdt_reset();
  switch (state) {
    case State::Countdown:
      countDown();
      break;
    case State::Running:
      run();
      break;
    case State::Ready:
    case State::LineLost:
    case State::Stopped:
    case State::Fault:
      break;
  }
  if (buttonPressed()) takePress();
  blink();
}
