# Part of the firmware of mist_cart. Written by fairlead 0.1.0; change the build sheet, not this
# file.
#
# When the vehicle moves and when it does not. After any reset the button has to be pressed.

import gc
from array import array

import motors
import states
import steering
import user_hooks
from blink import Blink
from board import Button, SampleClock, Sensors, Watchdog, was_reset_by_watchdog
from constants import COUNTDOWN_SAMPLES, OVERRUN_LIMIT, RUN_LIMIT_SAMPLES, SENSOR_COUNT


class Supervisor:
    def __init__(self):
        self._clock = SampleClock()
        self._sensors = Sensors()
        self._button = Button()
        self._watchdog = Watchdog()
        self._blink = Blink()
        self._steering = steering.Steering()
        self._counts = array("h", bytes(2 * SENSOR_COUNT))
        self.state = states.READY
        self.reason = states.REASON_WATCHDOG if was_reset_by_watchdog() else states.REASON_READY
        self._samples = 0  # in this state

    def sample(self):
        """Waits for the next sample period and sees to it."""
        self._clock.wait()
        self._watchdog.feed()
        if self._button.pressed():
            self._take_press()
        if self.state == states.RUNNING:
            self._run()
        elif self.state == states.COUNTDOWN:
            self._count_down()
        self._blink.step(self.state, self.reason)

    def _enter(self, state):
        self.state = state
        self._samples = 0

    def _stop(self, state, reason):
        motors.off()
        self.reason = reason
        self._enter(state)
        user_hooks.stopped(reason)

    def _take_press(self):
        if self.state == states.COUNTDOWN or states.is_moving(self.state):
            self._stop(states.STOPPED, states.REASON_BUTTON)
            return
        gc.collect()  # now, standing, so that it never has to be in a run
        self._enter(states.COUNTDOWN)

    def _count_down(self):
        self._samples += 1
        if self._samples < COUNTDOWN_SAMPLES:
            return
        self._clock.overruns = 0
        self._watchdog.start()
        self._start_run()

    def _start_run(self):
        self._steering.start()
        self._enter(states.RUNNING)

    def _run(self):
        self._sensors.read(self._counts)
        drive = self._steering
        drive.step(self._counts)
        self._samples += 1
        if drive.phase == steering.STOPPED:
            self._stop(states.LINE_LOST, states.REASON_LINE_LOST)
        elif self._samples >= RUN_LIMIT_SAMPLES:
            self._stop(states.STOPPED, states.REASON_RUN_LIMIT)
        elif self._clock.overruns > OVERRUN_LIMIT:
            self._stop(states.FAULT, states.REASON_OVERRUN)
        else:
            motors.set_duties(drive.duty_left_q12, drive.duty_right_q12)
            user_hooks.sample(drive)


def run():
    supervisor = Supervisor()
    user_hooks.setup()
    while True:
        supervisor.sample()
