import { describe, expect, test } from 'vitest';
import { FairleadError } from '../../src/sheet/problem.js';
import { deriveDesign } from '../../src/design/derive.js';
import { bindingLimit } from '../../src/design/speed-classes.js';
import { loopMargins } from '../../src/design/steering-loop.js';
import { keeps } from '../../src/design/tolerance-box.js';
import { STANDARD_GRAVITY_MPS2 } from '../../src/vehicle/gravity.js';
import { demoVehicle, demoVehicleOnBend } from './demo-vehicle.js';

describe.each(['pid', 'rules'] as const)('design of the demo cart, %s', (kind) => {
  const vehicle = demoVehicle(kind);
  const design = deriveDesign(vehicle);

  test('each class keeps the margins in every corner with the integers that are rendered', () => {
    for (const each of design.classes) {
      expect(keeps(each.worstMargins), each.name).toBe(true);
      expect(loopMargins(each.plant, each.controller)).toEqual(each.margins);
    }
  });

  test('no class passes its limits, and each names the one that binds', () => {
    for (const each of design.classes) {
      const least = each.limits[bindingLimit(each.limits)];
      expect(each.speedMps).toBeLessThanOrEqual(least);
      if (each.limitedBy !== 'finish') expect(each.speedMps).toBe(least);
    }
  });

  test('grip limit is sqrt(mu g R)', () => {
    for (const { minRadiusM, limits } of design.classes) {
      expect(limits.grip).toBeCloseTo(Math.sqrt(0.7 * STANDARD_GRAVITY_MPS2 * minRadiusM), 9);
    }
  });

  test('wider bends are never driven slower', () => {
    const speeds = design.classes.map((each) => each.speedMps);
    expect(speeds).toEqual(speeds.toSorted((a, b) => b - a));
  });

  test('is the same every time', () => {
    expect(JSON.stringify(deriveDesign(vehicle).controller)).toBe(JSON.stringify(design.controller));
  });
});

test('speeds of the sheet are kept as they are and judged', () => {
  const vehicle = demoVehicle();
  const classes = [
    { name: 'run', minRadiusM: 0.4, speedMps: 0.7 },
    { name: 'bend', minRadiusM: 0.12, speedMps: 0.4 },
  ];
  const design = deriveDesign({ ...vehicle, speeds: { ...vehicle.speeds, classes } });
  expect(design.classes.map((each) => [each.name, each.speedMps, each.limitedBy])).toEqual([
    ['run', 0.7, 'sheet'],
    ['bend', 0.4, 'sheet'],
  ]);
  expect(design.controller.classes.map((each) => each.speedSlope)).toEqual([0, 0]);
});

test('a speed at which no steering keeps its margins is refused with the limits', () => {
  const vehicle = demoVehicle();
  const slow = { ...vehicle, drive: { ...vehicle.drive, lagS: 0.6 } };
  const classes = [{ name: 'all', minRadiusM: 0.12, speedMps: 1.4 }];
  const attempt = () => deriveDesign({ ...slow, speeds: { ...vehicle.speeds, classes } });
  expect(attempt).toThrow(FairleadError);
  try {
    attempt();
  } catch (error) {
    const { exitCode, problems } = error as FairleadError;
    expect(exitCode).toBe(3);
    expect(problems[0]?.message).toMatch(
      /class all, bends of 120 mm radius: at 1\.40 m\/s no steering law keeps the required margins/,
    );
    expect(problems[0]?.allowed).toMatch(/control limit \d\.\d\d m\/s/);
  }
});

test('a longer bar, a quicker motor or more grip never makes the tight class slower', () => {
  const tight = (design: ReturnType<typeof deriveDesign>) =>
    design.classes.find((each) => each.name === 'tight')!.limits;
  const vehicle = demoVehicle();
  const base = tight(deriveDesign(vehicle));
  const quick = tight(deriveDesign({ ...vehicle, drive: { ...vehicle.drive, lagS: 0.05 } }));
  const sticky = tight(deriveDesign({ ...vehicle, drive: { ...vehicle.drive, grip: 0.9 } }));
  expect(quick.control).toBeGreaterThanOrEqual(base.control);
  expect(quick.view).toBeGreaterThanOrEqual(base.view);
  expect(sticky.grip).toBeGreaterThan(base.grip);
});

test('scaling all lengths by four and times by two scales speeds by two and gains by a sixteenth', () => {
  const vehicle = demoVehicleOnBend(0.16);
  const s = 4;
  const scaled = {
    ...vehicle,
    line: { ...vehicle.line, widthM: 0.019 * s, tightestRadiusM: 0.16 * s, longestGapM: 0.04 * s },
    bar: {
      ...vehicle.bar,
      positionsM: vehicle.bar.positionsM.map((p) => p * s),
      aheadM: vehicle.bar.aheadM * s,
      spotRadiusM: vehicle.bar.spotRadiusM * s,
    },
    drive: {
      ...vehicle.drive,
      trackM: vehicle.drive.trackM * s,
      topSpeedMps: vehicle.drive.topSpeedMps * 2,
      lagS: vehicle.drive.lagS * 2,
    },
    board: {
      ...vehicle.board,
      samplePeriodS: vehicle.board.samplePeriodS * 2,
      adcReadS: vehicle.board.adcReadS * 2,
      computeS: vehicle.board.computeS * 2,
      pwmHz: vehicle.board.pwmHz / 2,
    },
  };
  const small = deriveDesign(vehicle).classes;
  deriveDesign(scaled).classes.forEach((each, i) => {
    const before = small[i]!;
    expect(each.limits.grip / before.limits.grip).toBeCloseTo(2, 9);
    expect(each.limits.control / before.limits.control).toBeCloseTo(2, 9);
    expect(each.gains.proportionalPerM2 / before.gains.proportionalPerM2).toBeCloseTo(1 / 16, 3);
    expect(each.gains.derivativeTimeS / before.gains.derivativeTimeS).toBeCloseTo(2, 1);
  });
});

describe('gains by hand', () => {
  const vehicle = demoVehicle();
  const withGains = (proportionalPerM2: number, derivativeTimeS: number) =>
    deriveDesign({
      ...vehicle,
      control: { ...vehicle.control, gains: { proportionalPerM2, derivativeTimeS, filterTimeS: 0.004 } },
    });

  test('are kept, and limit the speed to where they keep the margins', () => {
    const design = withGains(600, 0.02);
    for (const each of design.classes) {
      expect(each.gains.proportionalPerM2).toBeCloseTo(600, 0);
      expect(each.gains.derivativeTimeS).toBeCloseTo(0.02, 4);
      expect(each.limitedBy).toBe('control');
      expect(keeps(each.worstMargins)).toBe(true);
    }
    expect(design.remarks).toEqual([]);
  });

  test('that never keep the margins are told so', () => {
    const design = withGains(20000, 0);
    expect(design.classes[0]!.limits.control).toBe(0);
    expect(design.remarks.join(' ')).toMatch(
      /The gains of the sheet miss the required margins .* classes straight, /,
    );
  });
});
