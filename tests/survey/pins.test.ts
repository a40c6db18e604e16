import { describe, expect, it } from 'vitest';
import { Facts } from '../../src/survey/facts.js';
import { pinNeeds, pinValues, waysOut } from '../../src/survey/pins.js';
import { questionOf } from './prompt-helpers.js';

const byHand = { '#pins': 'by-hand' };

describe('a pin asked for by hand', () => {
  it('is refused where the board cannot use it so, with the pins that are free', () => {
    const question = questionOf('/sensors/pins/0', new Facts({}, byHand));
    expect(question.title).toBe('Sensor 1 of 6, pin');
    expect(question.read('A3')).toEqual({ value: 'A3' });
    expect(question.read('a3')).toEqual({ value: 'A3' });
    expect(question.read('9')).toEqual({
      problem: 'Pin 9 is not possible: it cannot serve as analog sensor. Free pins that can do it: A0 to A5.',
    });
    expect(question.read('A9')).toEqual({
      problem: 'Uno has no pin "A9". Free pins that can do it: A0 to A5.',
    });
    expect(question.read('0')).toMatchObject({
      problem: expect.stringMatching(/^Pin 0 is not possible: /) as string,
    });
  });

  it('is refused where one asked for before has taken it', () => {
    const question = questionOf('/sensors/pins/1', new Facts({}, { ...byHand, '/sensors/pins/0': 'A1' }));
    expect(question.read('A1')).toEqual({
      problem: 'Pin A1 is taken: Sensor 1 of 6, pin. Free pins that can do it: A0, A2 to A5.',
    });
    // The proposal has A1 here; the next free one is offered instead.
    expect(question.defaultValue).toBe('A0');
  });

  it('says what is to be watched', () => {
    const question = questionOf('/sensors/pins/0', new Facts({}, { ...byHand, '/target/board': 'esp32' }));
    expect(question.help.join('\n')).toContain('GPIO2: ');
  });
});

describe('the pins that a vehicle needs', () => {
  it.each([
    ['pwm-dir', 6 + 4 + 1],
    ['pwm-in-in', 6 + 6 + 1],
    ['dual-pwm', 6 + 4 + 1],
  ])('with %s are %d', (scheme, count) => {
    expect(pinNeeds(new Facts({}, { '/drive/driver/scheme': scheme }))).toHaveLength(count);
  });

  it('include a standby pin where there is one', () => {
    const facts = new Facts({}, { '#standby': true });
    expect(pinNeeds(facts).map(({ pointer }) => pointer)).toContain('/drive/driver/standbyPin');
    expect(pinValues(facts).map(([pointer]) => pointer)).toContain('/drive/driver/standbyPin');
  });

  it('include a stop input where one is wanted, in the sheet at hand or by the answer', () => {
    const wanted = new Facts({}, { '#stopInput': true });
    expect(pinValues(wanted).map(([pointer]) => pointer)).toContain('/stopPin');
    expect(pinNeeds(new Facts({ stopPin: 12 }, {})).map(({ pointer }) => pointer)).toContain('/stopPin');
    const dropped = new Facts({ stopPin: 12 }, { '#stopInput': false });
    expect(pinNeeds(dropped).map(({ pointer }) => pointer)).not.toContain('/stopPin');
  });

  it('of a sheet are kept as long as what decides them stays', () => {
    const base = {
      target: { board: 'uno' },
      sensors: { kind: 'analog', count: 2, pins: ['A4', 'A5'] },
      drive: { driver: { scheme: 'pwm-dir', left: { pwm: 9, dir: 7 }, right: { pwm: 10, dir: 8 } } },
      start: { buttonPin: 3 },
    };
    expect(pinValues(new Facts(base, {}))[0]).toEqual(['/sensors/pins', ['A4', 'A5']]);
    expect(pinValues(new Facts(base, { '/sensors/count': 3 }))[0]).toEqual([
      '/sensors/pins',
      ['A0', 'A1', 'A2'],
    ]);
    expect(pinValues(new Facts(base, { '#pins': 'proposed' }))[0]).toEqual(['/sensors/pins', ['A0', 'A1']]);
  });
});

describe('waysOut', () => {
  it('of too many digital sensors are boards with more pins, and fewer sensors', () => {
    const facts = new Facts({}, { '/sensors/kind': 'digital', '/sensors/count': 16 });
    const labels = waysOut(facts).map(({ label }) => label);
    expect(labels).toContain('board pico');
    expect(labels.at(-1)).toMatch(/^\d+ sensors$/);
    expect(labels).not.toContain('digital sensors');
  });
});
