/** Describing functions against closed forms and the relay experiment. */
import { describe, expect, test } from 'vitest';
import { cycleAmplitudes, describingGain, largestGain } from '../../src/design/describing-function.js';

describe('relay of height 1 (Astrom and Hagglund 1984; closed form N = 4/(pi A))', () => {
  const relay = [{ at: 0, height: 1 }];

  test.each([0.1, 0.5, 2])('gain at amplitude %d', (amplitude) => {
    expect(describingGain(relay, amplitude)).toBeCloseTo(4 / (Math.PI * amplitude), 12);
  });

  // 1/(s+1)^3 oscillates at gain 8: predicted amplitude 4/(8 pi) = 0.159155; the exact cycle (Tsypkin) has 0.16306148 (computed)
  test('on 1/(s+1)^3 predicts amplitude 0.159155, 2.4 % below the exact cycle', () => {
    const [amplitude] = cycleAmplitudes(relay, 8, 1);
    expect(amplitude).toBeCloseTo(0.159155, 6);
    expect(amplitude! / 0.16306148).toBeCloseTo(1 - 0.024, 3);
  });
});

describe('relay with dead zone (closed form: N = 4/(pi A) sqrt(1 - (d/A)^2), greatest 2/(pi d) at A = d sqrt 2)', () => {
  const relay = [{ at: 0.3, height: 1 }];

  test('is 0 inside the dead zone and follows the closed form beyond it', () => {
    expect(describingGain(relay, 0.29)).toBe(0);
    expect(describingGain(relay, 0.5)).toBeCloseTo((4 / (Math.PI * 0.5)) * 0.8, 12);
  });

  test('has its greatest gain', () => {
    expect(largestGain(relay, 2)).toBeCloseTo(2 / (Math.PI * 0.3), 5);
  });
});

// quantiser of step 1 (mid-tread): for large amplitudes the gain tends to the slope 1, never above 4/pi (textbook fact, from memory)
test('a fine staircase acts like the straight line through it', () => {
  const steps = Array.from({ length: 200 }, (_, i) => ({ at: i + 0.5, height: 1 }));
  expect(describingGain(steps, 100)).toBeCloseTo(1, 2);
  expect(largestGain(steps, 100)).toBeLessThan(4 / Math.PI);
  expect(largestGain(steps, 100)).toBeGreaterThan(1.2);
});
