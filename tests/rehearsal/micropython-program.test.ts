/** Programs in the MicroPython interpreter on the virtual chip: time, pins, and every way in which a program can end. */
import { describe, expect, it } from 'vitest';
import type { Surroundings } from '../../src/rehearsal/micropython-chip.js';
import { type PythonFile, withInterpreter } from '../../src/rehearsal/micropython-interpreter.js';
import { PowerCut, runProgram } from '../../src/rehearsal/micropython-program.js';
import { BOARDS } from '../../src/vehicle/boards.js';

/** Nothing is connected; the power lasts 10 s. What the pins give is noted with its time. */
class Bare implements Surroundings {
  timeS = 0;
  readonly outputs: [timeS: number, gpio: number, level: number][] = [];
  constructor(private readonly sensor = -1) {}
  advance(durationS: number): void {
    this.timeS += durationS;
    if (this.timeS > 10) throw new PowerCut();
  }
  count(): number {
    return 1234;
  }
  level(): undefined {
    return undefined;
  }
  drive(gpio: number, level: number): void {
    this.outputs.push([this.timeS, gpio, level]);
  }
  isSensor(gpio: number): boolean {
    return gpio === this.sensor;
  }
  isMotor(gpio: number): boolean {
    return gpio === 2;
  }
}

const main = (text: string): PythonFile => ({ path: 'main.py', text });
const onPico = (text: string, around = new Bare()) => runProgram([main(text)], BOARDS.pico, around);
const onEsp32 = (text: string, around = new Bare()) => runProgram([main(text)], BOARDS.esp32, around);

describe('a program', () => {
  it('runs as the main script, with its modules beside it', async () => {
    const helper = { path: 'helper.py', text: 'def greet():\n    return "hello from " + __name__\n' };
    const end = await runProgram(
      [main('import helper\nprint(helper.greet())\nprint(__name__)\n'), helper],
      BOARDS.pico,
      new Bare(),
    );
    expect(end).toEqual({ by: 'returned', detail: '', output: ['hello from helper', '__main__'] });
  });

  it('starts afresh each time', async () => {
    await onPico('import sys\nsys.leftover = 1\nimport machine\nmachine.leftover = 1\n');
    const end = await onPico(
      'import sys, machine\nprint(hasattr(sys, "leftover"), hasattr(machine, "leftover"))\n',
    );
    expect(end.output).toEqual(['False False']);
  });

  it('that raises ends with the traceback that the board would print', async () => {
    const end = await onPico('def f():\n    return 1 // 0\n\nf()\n');
    expect(end.by).toBe('exception');
    expect(end.detail.trim().split('\n')).toEqual([
      'Traceback (most recent call last):',
      expect.stringContaining('File "<stdin>"'),
      '  File "main.py", line 4, in <module>',
      '  File "main.py", line 2, in f',
      'ZeroDivisionError: divide by zero',
    ]);
  });

  it('with a syntax error ends with its line', async () => {
    const end = await onPico('x = 1\ndef f(:\n');
    expect(end).toMatchObject({
      by: 'exception',
      detail: expect.stringMatching(/line 2\nSyntaxError/) as string,
    });
  });

  it.each([
    ['sleeps', 'time.sleep_ms(5)'],
    ['reads the clock', 'time.ticks_us()'],
    ['reads a pin', 'pin.value()'],
    ['sleeps and catches everything', 'try:\n        time.sleep(1)\n    except:\n        pass'],
  ])('that for ever %s is cut off', async (_what, body) => {
    const text = `import time\nfrom machine import Pin\npin = Pin(3, Pin.IN)\nwhile True:\n    ${body}\n`;
    expect(await onPico(text)).toMatchObject({ by: 'power-cut' });
  });

  it('may end by itself', async () => {
    expect(await onPico('import sys\nsys.exit()\n')).toMatchObject({ by: 'returned', detail: '' });
    expect(await onPico('import machine\nmachine.reset()\n')).toMatchObject({ by: 'reset' });
  });

  it('prints no more than can be kept', async () => {
    const { output } = await onPico('for i in range(3000):\n    print(i)\n');
    expect(output).toHaveLength(1000);
    expect(output.at(-1)).toBe('999');
  });

  it('is reset by a watchdog that is not fed', async () => {
    const around = new Bare();
    const text =
      'import time\nfrom machine import WDT\nw = WDT(timeout=300)\ntime.sleep_ms(250)\nw.feed()\ntime.sleep(5)\n';
    expect((await onPico(text, around)).detail).toBe('The watchdog was not fed for 300 ms.');
    expect(around.timeS).toBeCloseTo(0.55, 3);
  });
});

describe('time', () => {
  it('has tick counters that wrap at 2^30 during a run, and differences that do not mind', async () => {
    const end = await onPico(
      'from time import *\nbefore = ticks_us()\nsleep_ms(1500)\nafter = ticks_us()\n' +
        'print(after < before, ticks_diff(after, before) // 1000, ticks_diff(before, after) // 1000)\n' +
        'print(ticks_diff(ticks_add(before, 2000000), before), ticks_add(2**30 - 1, 1))\n',
    );
    expect(end.output).toEqual(['True 1500 -1501', '2000000 0']);
  });

  it('passes at the stated costs, with the arithmetic before the output that follows a sensor reading', async () => {
    const around = new Bare(26);
    const text =
      'from machine import ADC, PWM, Pin\nadc = ADC(Pin(26))\npwm = PWM(Pin(2, Pin.OUT, value=0))\n' +
      'adc.read_u16()\nadc.read_u16()\npwm.duty_u16(65535)\npwm.duty_u16(32768)\n';
    await onPico(text, around);
    const { adcReadS, computeS, digitalReadS } = BOARDS.pico;
    // the pin's level and direction, two readings, the arithmetic, the duty
    const full = 2 * digitalReadS + 2 * adcReadS + computeS + digitalReadS;
    expect(around.outputs).toEqual([
      [expect.closeTo(full, 9), 2, 1],
      [expect.closeTo(full + digitalReadS, 9), 2, expect.closeTo(0.5, 3)],
    ]);
  });
});

describe('pins', () => {
  it('read 12 bits widened to 16, and a pull-up', async () => {
    const text =
      'from machine import ADC, Pin\nprint(ADC(Pin(26)).read_u16() >> 4)\n' +
      'print(Pin(3, Pin.IN, Pin.PULL_UP).value(), Pin(4, Pin.IN).value())\n';
    expect((await onPico(text)).output).toEqual(['1234', '1 0']);
  });

  it('of the ESP32 see only the full range with 11 dB', async () => {
    const text =
      'from machine import ADC, Pin\nprint(ADC(Pin(32), atten=ADC.ATTN_11DB).read_u16() >> 4)\n' +
      'print(ADC(Pin(32)).read_u16() >> 4)\n';
    expect((await onEsp32(text)).output).toEqual(['1234', '4095']);
  });

  it('get their level before they become outputs', async () => {
    const around = new Bare();
    await onPico('from machine import Pin\nPin(5, Pin.OUT, value=0)\nPin(6, Pin.OUT, value=1)\n', around);
    expect(around.outputs.map(([, gpio, level]) => [gpio, level])).toEqual([[6, 1]]);
  });

  it.each([
    ['pico', 'Pin(99)', 'invalid pin'],
    ['pico', 'ADC(Pin(3))', 'pin 3 has no converter'],
    ['pico', 'WDT(timeout=8389)', 'timeout exceeds 8388'],
    ['esp32', 'Pin(34, Pin.OUT)', 'pin 34 can only be an input'],
    ['esp32', 'Pin(34, Pin.IN, Pin.PULL_UP)', 'pin 34 has no pull-up'],
    ['esp32', 'PWM(Pin(35))', 'pin 35 cannot do PWM'],
  ] as const)('%s refuses %s', async (board, code, reason) => {
    const end = await runProgram([main(`from machine import *\n${code}\n`)], BOARDS[board], new Bare());
    expect(end.detail.trim().split('\n').at(-1)).toBe(`ValueError: ${reason}`);
  });
});

describe('the interpreter', () => {
  it('keeps integers of 31 bits off the heap, as the boards do, and no larger ones', async () => {
    const failures = await withInterpreter((interpreter) =>
      ['1 << 29', '1 << 30'].map((start) => {
        const source = `
import micropython
def doubled(x):
    micropython.heap_lock()
    try:
        return x + x - 1
    finally:
        micropython.heap_unlock()
doubled((${start}) >> 1)
`;
        try {
          interpreter.run(source);
          return undefined;
        } catch (error) {
          return (error as { type?: string }).type;
        }
      }),
    );
    expect(failures).toEqual([undefined, 'MemoryError']);
  });

  it('is one at a time, in the order of asking', async () => {
    const order: number[] = [];
    await Promise.all([1, 2, 3].map((i) => withInterpreter(() => order.push(i))));
    expect(order).toEqual([1, 2, 3]);
  });
});
