/** Faults as they are written, and what they do to the plant. */
import { describe, expect, it } from 'vitest';
import { checkFaults, parseFault } from '../../src/rehearsal/fault.js';
import { LedReader } from '../../src/rehearsal/ending.js';
import { Plant } from '../../src/rehearsal/plant.js';
import { FairleadError } from '../../src/sheet/problem.js';
import { compileCourse } from '../../src/course/lane.js';
import { cart } from '../firmware/cart.js';
import { plainPlant } from './vehicles.js';

const lane = compileCourse({
  courseVersion: 1,
  closed: false,
  lineWidthMm: 19,
  pieces: [{ straightMm: 3000 }],
});

it.each([
  ['sensor=2:stuck-high@3.0s', { kind: 'sensor', sensorIndex: 1, how: 'stuck-high', atS: 3 }],
  ['light=-40%@1s+0.5s', { kind: 'light', lightShare: -0.4, atS: 1, durationS: 0.5 }],
  ['battery=4.8V@0s', { kind: 'battery', batteryV: 4.8, atS: 0 }],
  ['wheel=left:blocked@2s', { kind: 'wheel', side: 'left', atS: 2 }],
  ['line=gone@2s+0.3s', { kind: 'line', atS: 2, durationS: 0.3 }],
  ['bump=-8mm:90deg@2s', { kind: 'bump', shiftM: -0.008, turnRad: Math.PI / 2, atS: 2 }],
  ['program=hangs@2s', { kind: 'program', atS: 2 }],
  ['supply=breaks@2s', { kind: 'supply', atS: 2 }],
  ['stop=open@2s+0.1s', { kind: 'stop', atS: 2, durationS: 0.1 }],
])('reads %s', (text, fault) => expect(parseFault(text)).toEqual(fault));

it.each([
  ['sensor=2:stuck-high', '"sensor=2:stuck-high" does not end in its time, such as @3.0s or @3.0s+0.5s.'],
  ['sensor=0:noisy@1s', '"sensor=0:noisy@1s": 0 is outside 1 to 16.'],
  ['battery=99V@1s', '"battery=99V@1s": 99 V is outside 0 to 60 V.'],
  ['bump=2mm@1s+1s', '"bump=2mm@1s+1s": this fault happens at a moment and has no duration.'],
  ['line=gone@-1s', '"line=gone@-1s": -1 s is outside 0 to 3600 s.'],
])('refuses %s', (text, message) => expect(() => parseFault(text)).toThrow(message));

it('refuses a stop input on the twin, and where the vehicle has none', () => {
  const problemsOf = (vehicle: ReturnType<typeof cart>, engine: 'twin' | 'chip'): string[] => {
    try {
      checkFaults([parseFault('stop=open@1s')], vehicle, engine);
      return [];
    } catch (error) {
      return (error as FairleadError).problems.map(({ message }) => message);
    }
  };
  expect(problemsOf(cart(), 'chip')).toEqual(['There is no stop input whose contact could open.']);
  expect(problemsOf(cart({ '/stopPin': 12 }), 'twin')).toEqual([
    'The twin is the controller alone: it has no stop input.',
  ]);
  expect(problemsOf(cart({ '/stopPin': 12 }), 'chip')).toEqual([]);
});

it('refuses what vehicle or engine do not have', () => {
  const faults = [parseFault('sensor=7:noisy@1s'), parseFault('program=hangs@1s')];
  expect(() => checkFaults(faults, cart(), 'chip')).toThrow(FairleadError);
  try {
    checkFaults(faults, cart(), 'twin');
    expect.unreachable();
  } catch (error) {
    expect((error as FairleadError).problems.map(({ message }) => message)).toEqual([
      'There is no sensor 7 to be noisy.',
      'The twin is the controller alone: it has no program that could hang.',
    ]);
  }
});

describe('in the plant', () => {
  const counts = (fault: string): number[] => {
    const plant = new Plant(plainPlant(), lane, [parseFault(fault)]);
    const seen = new Int32Array(6);
    plant.step(0, 0, 2e-3);
    plant.step(0, 0, 2e-3);
    plant.readCounts(seen);
    return [...seen];
  };
  const healthy = counts('line=gone@9s');

  it('a stuck sensor reads an end of the range, the others what they did', () => {
    expect(counts('sensor=1:stuck-high@0.001s')).toEqual([1023, ...healthy.slice(1)]);
    expect(counts('sensor=3:stuck-low@0.001s')).toEqual(healthy.map((count, i) => (i === 2 ? 0 : count)));
  });

  it('an unplugged sensor stays near the reading before it', () => {
    const seen = counts('sensor=5:unplugged@0.001s');
    expect(Math.abs(seen[4]! - seen[3]!)).toBeLessThan(0.1 * 1023 + 1);
    expect(seen[4]).not.toBe(healthy[4]);
  });

  it('without a line all sensors see ground; light shifts all by its share', () => {
    expect(counts('line=gone@0.001s')).toEqual([100, 100, 100, 100, 100, 100]);
    expect(counts('light=10%@0.001s')).toEqual(healthy.map((count) => count + 80));
  });

  it('a blocked wheel stands, the other turns; a push comes once', () => {
    const plant = new Plant(plainPlant(), lane, [
      parseFault('wheel=left:blocked@0.5s'),
      parseFault('bump=8mm@0.1s'),
    ]);
    while (plant.timeS < 0.3) plant.step(0.5, 0.5, 2e-3);
    expect(plant.yM).toBeCloseTo(0.008, 6);
    while (plant.timeS < 0.6) plant.step(0.5, 0.5, 2e-3);
    expect(plant.leftMps).toBe(0);
    expect(plant.rightMps).toBeGreaterThan(0.5);
  });

  it('wheel speed falls with the battery: no-load speed is in proportion to voltage', () => {
    const plant = new Plant(plainPlant(), lane, [parseFault('battery=3V@1s')]);
    while (plant.timeS < 1) plant.step(0.5, 0.5, 2e-3);
    const before = plant.speedMps;
    while (plant.timeS < 2) plant.step(0.5, 0.5, 2e-3);
    expect(plant.speedMps / before).toBeCloseTo(0.5, 4);
  });
});

it('flashes are read as a person does: dark, a whole code, dark', () => {
  const read = (code: string): number | undefined => {
    const reader = new LedReader();
    for (let tick = 0; tick < 8 * code.length; tick++)
      for (let part = 0; part < 10; part++)
        reader.look(code[tick % code.length] === '1', (tick + part / 10) * 0.2);
    return reader.flashes;
  };
  expect(read('10'.repeat(3) + '000000')).toBe(3);
  expect(read('0'.repeat(3) + '10'.repeat(6) + '000')).toBe(6);
  // a code and its detail
  expect(read('10'.repeat(8) + '000' + '10'.repeat(2) + '000000')).toBe(8);
  expect(read('1')).toBeUndefined();
});
