import { describe, expect, test } from 'vitest';
import { CALIBRATION_BITS } from '../../src/controller/constants.js';
import { SweepCalibration } from '../../src/controller/calibration.js';

/** A sweep of three sensors: over ground at first (the middle one over the line), each crosses the line once. */
function swept(ground: number, line: number, flat = -1): ReturnType<SweepCalibration['finish']> {
  const sweep = new SweepCalibration(3, 100);
  for (const on of [1, 0, 1, 2, 1]) {
    sweep.observe(Int32Array.from([0, 1, 2], (i) => (i === on && i !== flat ? line : ground)));
  }
  return sweep.finish();
}

describe('calibration by sweep', () => {
  test('finds ground and gain where the line reads higher', () => {
    const { ok, ground, gain } = swept(120, 840);
    expect(ok).toBe(true);
    expect([...ground]).toEqual([120, 120, 120]);
    for (const each of gain) expect(((840 - 120) * each) >> CALIBRATION_BITS).toBe(255);
  });

  test('finds them where the line reads lower', () => {
    const { ok, ground, gain } = swept(840, 120);
    expect(ok).toBe(true);
    expect([...ground]).toEqual([840, 840, 840]);
    for (const each of gain) expect(((120 - 840) * each) >> CALIBRATION_BITS).toBe(255);
  });

  test('refuses a sensor that saw no contrast, and names it', () => {
    expect(swept(120, 840, 2)).toMatchObject({ ok: false, flatSensor: 2 });
    expect(swept(120, 190)).toMatchObject({ ok: false, flatSensor: 0 });
  });
});
