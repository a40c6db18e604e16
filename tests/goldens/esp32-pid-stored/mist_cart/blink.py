# Part of the firmware of mist_cart. Written by fairlead 0.1.0; change the build sheet, not this
# file.
#
# The LED: what the vehicle is doing, or why it stands still.

from machine import Pin
from micropython import const

from constants import BLINK_SAMPLES
from pins import LED_PIN
from states import COUNTDOWN, is_moving

_PAUSE_TICKS = const(6)  # after a code


def _lit_in(tick, flashes):
    """Whether the LED is lit in a tick of a number of flashes."""
    return tick < 2 * flashes and tick & 1 == 0


class Blink:
    def __init__(self):
        self._led = Pin(LED_PIN, Pin.OUT, value=0)
        self._samples = 0
        self._tick = 0

    def step(self, state, reason):
        """One sample period."""
        self._samples += 1
        if self._samples < BLINK_SAMPLES:
            return
        self._samples = 0
        self._tick += 1
        if state == COUNTDOWN:
            lit = self._tick & 1 == 1
        elif is_moving(state):
            lit = True
        else:
            lit = self._code(reason)
        self._led.value(lit)

    def _code(self, flashes):
        if self._tick >= 2 * flashes + _PAUSE_TICKS:
            self._tick = 0
        return _lit_in(self._tick, flashes)
