/**
 * `machine` and `time` as the boards' MicroPython offers them, for the interpreter that has no hardware.
 *
 * Both are thin: every call goes to the virtual chip (micropython-chip.ts), which knows pins and time. Only what
 * firmware of ours, and a user's hooks of the plain kind, may call is there; anything else is an AttributeError, as an
 * unknown name is on the board. The chip's functions are imported by name: looking one up on the
 * bridge takes heap each time, which the hardware does not. The numbers of the constants are those of the two ports.
 * Source: MicroPython documentation, machine and time; rp2 and esp32 quick references.
 */
import type { BoardFacts } from '../vehicle/board-facts.js';
import type { PythonFile } from './micropython-interpreter.js';

interface PortConstants {
  pinIn: number;
  pinOut: number;
  pullUp: number;
  pullDown: number;
  rising: number;
  falling: number;
  /** Further lines of class ADC. */
  adc: string;
}

const PORTS: Readonly<Record<string, PortConstants>> = {
  pico: { pinIn: 0, pinOut: 1, pullUp: 1, pullDown: 2, rising: 8, falling: 4, adc: '' },
  esp32: {
    pinIn: 1,
    pinOut: 3,
    pullUp: 2,
    pullDown: 1,
    rising: 1,
    falling: 2,
    adc: `
    ATTN_0DB = 0
    ATTN_2_5DB = 1
    ATTN_6DB = 2
    ATTN_11DB = 3
`,
  },
};

function machineSource(port: PortConstants): string {
  return `
from _chip import configure, configure_adc, configure_pwm, duty, feed, find, frequency, number
from _chip import edge, read, read_u16, reset, reset_cause, start_watchdog, write

PWRON_RESET = 1
WDT_RESET = 3


def _refuse(reason):
    if reason:
        raise ValueError(reason)


# Interrupts are let in whenever the program waits: pins with their handlers.
_handlers = []


def _interrupt():
    for pin, handler in _handlers:
        while edge(pin._gpio):
            handler(pin)


class Pin:
    IN = ${port.pinIn}
    OUT = ${port.pinOut}
    PULL_UP = ${port.pullUp}
    PULL_DOWN = ${port.pullDown}
    IRQ_RISING = ${port.rising}
    IRQ_FALLING = ${port.falling}

    def __init__(self, id, mode=-1, pull=-1, *, value=None):
        _refuse(find(id))
        self._gpio = number(id)
        if mode != -1:
            self.init(mode, pull, value=value)

    def init(self, mode=-1, pull=-1, *, value=None):
        if value is not None:
            write(self._gpio, bool(value))
        _refuse(configure(self._gpio, mode == Pin.OUT, pull == Pin.PULL_UP))

    def value(self, x=None):
        if x is None:
            return read(self._gpio)
        write(self._gpio, bool(x))

    __call__ = value

    def irq(self, handler=None, trigger=3, hard=False):
        _handlers.append((self, handler))

    def on(self):
        write(self._gpio, True)

    def off(self):
        write(self._gpio, False)


class ADC:
${port.adc}
    def __init__(self, pin${port.adc === '' ? '' : ', *, atten=0'}):
        self._gpio = pin._gpio if isinstance(pin, Pin) else pin
        _refuse(configure_adc(self._gpio, ${port.adc === '' ? '-1' : 'atten'}))

    def read_u16(self):
        return read_u16(self._gpio)


class PWM:
    def __init__(self, dest, *, freq=-1, duty_u16=-1):
        self._gpio = dest._gpio
        _refuse(configure_pwm(self._gpio))
        if freq != -1:
            self.freq(freq)
        if duty_u16 != -1:
            self.duty_u16(duty_u16)

    def freq(self, hz):
        _refuse(frequency(self._gpio, hz))

    def duty_u16(self, u16):
        duty(self._gpio, u16)

    def deinit(self):
        duty(self._gpio, 0)


class WDT:
    def __init__(self, id=0, timeout=5000):
        _refuse(start_watchdog(timeout))

    def feed(self):
        feed()
`;
}

const TIME = `
from machine import _interrupt
from _chip import sleep_ms as _sleep_ms, sleep_us as _sleep_us, ticks_us as _ticks_us
from _chip import ticks_add, ticks_diff, ticks_ms


def sleep_us(us):
    _sleep_us(us)
    _interrupt()


def sleep_ms(ms):
    _sleep_ms(ms)
    _interrupt()


def ticks_us():
    _interrupt()
    return _ticks_us()


def sleep(seconds):
    sleep_us(int(seconds * 1000000))
`;

/** The two modules for a board. */
export function boardModules(board: BoardFacts): PythonFile[] {
  const port = PORTS[board.id];
  if (port === undefined) throw new Error(`No MicroPython port is modelled for ${board.id}.`);
  return [
    { path: 'machine.py', text: machineSource(port) },
    { path: 'time.py', text: TIME },
  ];
}
