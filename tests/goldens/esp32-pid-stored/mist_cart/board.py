# Part of the firmware of mist_cart. Written by fairlead 0.1.0; change the build sheet, not this
# file.
#
# The board: sample clock, sensors, start button, watchdog.

from time import sleep_us, ticks_add, ticks_diff, ticks_us

from machine import ADC, WDT, WDT_RESET, Pin, reset_cause
from micropython import const

from constants import DEBOUNCE_SAMPLES, SAMPLE_PERIOD_US, SENSOR_COUNT
from pins import BUTTON_PIN, SENSOR_PINS

_WATCHDOG_MS = const(200)


class SampleClock:
    def __init__(self):
        self.overruns = 0
        self._due_us = ticks_us()

    def wait(self):
        """Waits until a sample is to begin.

        One that is a whole period late counts as an overrun, and the clock starts afresh from it.
        """
        now_us = ticks_us()
        early_us = ticks_diff(self._due_us, now_us)
        if early_us > 0:
            sleep_us(early_us)
        elif early_us <= -SAMPLE_PERIOD_US:
            self.overruns += 1
            self._due_us = now_us
        self._due_us = ticks_add(self._due_us, SAMPLE_PERIOD_US)


class Sensors:
    def __init__(self):
        # With 11 dB of attenuation the converter reaches nearly to the supply.
        self._adcs = [ADC(Pin(pin), atten=ADC.ATTN_11DB) for pin in SENSOR_PINS]

    def read(self, counts):
        """One reading a sensor, leftmost first: the 12 bits that the converter has."""
        for i in range(SENSOR_COUNT):
            counts[i] = self._adcs[i].read_u16() >> 4


class Button:
    def __init__(self):
        self._pin = Pin(BUTTON_PIN, Pin.IN, Pin.PULL_UP)
        self._down = True
        self._differs = 0

    def pressed(self):
        """Whether it has just been pressed; to be asked once a sample.

        A button that is held down since the reset does not count until it has been released.
        """
        down = self._pin.value() == 0
        if down == self._down:
            self._differs = 0
            return False
        self._differs += 1
        if self._differs < DEBOUNCE_SAMPLES:
            return False
        self._differs = 0
        self._down = down
        return down


class Watchdog:
    """Resets the board, which switches the motors off, if the program hangs.

    Nothing stops it once it is started: the first run starts it, every sample then feeds it.
    """

    def __init__(self):
        self._wdt = None

    def start(self):
        if self._wdt is None:
            self._wdt = WDT(timeout=_WATCHDOG_MS)

    def feed(self):
        if self._wdt is not None:
            self._wdt.feed()


def was_reset_by_watchdog():
    return reset_cause() == WDT_RESET
