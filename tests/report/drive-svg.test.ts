import { describe, expect, it } from 'vitest';
import { driveSvg } from '../../src/report/drive-svg.js';
import { niceStep } from '../../src/report/axis-steps.js';
import { speedSteps, stepOf } from '../../src/report/speed-scale.js';
import { drive } from './driven.js';

const slow = drive(0.3);
const fast = drive(1.45);
const words = { title: 'tray-cart on nursery-lane.json', summary: 'finished' };

/** Tags in order; throws unless each opened element is closed. */
function tagsOf(svg: string): string[] {
  const open: string[] = [];
  const tags: string[] = [];
  for (const [, close, name, alone] of svg.matchAll(/<(\/?)([a-z]+)(?:\s+[\w:-]+="[^"<]*")*\s*(\/?)>/g)) {
    tags.push(name!);
    if (close === '/') expect(open.pop()).toBe(name);
    else if (alone !== '/') open.push(name!);
  }
  expect(open).toEqual([]);
  return tags;
}

describe('driveSvg', () => {
  it('is well formed and has no odd numbers in it', () => {
    for (const { run } of [slow, fast]) {
      const svg = driveSvg(run, words);
      expect(tagsOf(svg)[0]).toBe('svg');
      expect(svg.replace(/<[^<>]*>/g, '')).not.toMatch(/[<>]/);
      expect(svg).not.toMatch(/NaN|Infinity|undefined|-0[" ]/);
    }
  });

  it('names what is on the lane', () => {
    const svg = driveSvg(slow.run, words);
    for (const word of ['start', 'crossing', 'gap 40 mm', '500 mm', 'lap 2', 'mm left', 'mm right']) {
      expect(svg.includes(`>${word}<`), word).toBe(true);
    }
    expect(svg).not.toContain('>lap 3<');
    expect(svg).not.toContain('>lost<');
  });

  it('shows where a run was lost', () => {
    expect(driveSvg(fast.run, words).match(/>lost</g)).toHaveLength(2);
  });

  it('is the same text for the same run', () => {
    expect(driveSvg(drive(0.3).run, words)).toBe(driveSvg(slow.run, words));
  });

  it('escapes what a sheet may be called', () => {
    const svg = driveSvg(slow.run, { title: '</title><script>"&\u0001', summary: 'a < b' });
    expect(svg).toContain('&lt;/title&gt;&lt;script&gt;&quot;&amp;<');
    expect(svg).not.toContain('<script');
    tagsOf(svg);
  });
});

describe('speedSteps', () => {
  const ramp = Float64Array.from({ length: 1000 }, (_, i) => 0.3 + i / 1000);

  it('rise without a hole and take in every speed', () => {
    const steps = speedSteps(ramp);
    expect(steps.map((step) => step.label)).toEqual([
      'below 0.55',
      '0.55 to 0.75',
      '0.75 to 0.95',
      '0.95 to 1.15',
      'above 1.15',
    ]);
    expect([0, 0.549, 0.551, 1.2, 9].map((speed) => stepOf(steps, speed))).toEqual([0, 0, 1, 4, 4]);
  });

  it('get brighter and thinner all the way, so that order is seen without colour', () => {
    const luminance = (color: string): number => {
      const [r, g, b] = [1, 3, 5].map((at) => Number.parseInt(color.slice(at, at + 2), 16));
      return 0.2126 * r! + 0.7152 * g! + 0.0722 * b!;
    };
    const steps = speedSteps(ramp);
    for (let i = 1; i < steps.length; i++) {
      expect(luminance(steps[i]!.color)).toBeGreaterThan(luminance(steps[i - 1]!.color) + 15);
      expect(steps[i]!.width).toBeLessThan(steps[i - 1]!.width);
    }
  });

  it.each([
    [[0, 0, 0], 2],
    [[0.5], 2],
    [[0.5, 0.58], 2],
  ])('of %j are %i', (speeds, count) => {
    expect(speedSteps(Float64Array.from(speeds))).toHaveLength(count);
  });
});

describe('niceStep', () => {
  it.each([
    [10, 5, 2],
    [10.6, 10, 2],
    [0.93, 6, 0.2],
    [24, 2, 20],
    [5, 5, 1],
  ])('cuts %f into about %i parts: %f', (range, parts, expected) => {
    expect(niceStep(range, parts)).toBeCloseTo(expected, 12);
  });
});
