import { describe, expect, it } from 'vitest';
import { checkSheet } from '../../src/sheet/check.js';
import type { ResolvedSheet } from '../../src/sheet/defaults.js';
import { withDefaults } from '../../src/sheet/defaults.js';
import type { Sheet } from '../../src/sheet/sheet-types.js';
import { sheetFromAnswers } from '../../src/survey/answers-file.js';
import { barNumbers, feedbackAfter, gripSpeedMps } from '../../src/survey/feedback.js';

/** The demo's sheet with some values changed; its problems are not minded. */
function sheetWith(change: (sheet: Sheet) => void): ResolvedSheet {
  const made = sheetFromAnswers({}, {});
  if ('problems' in made) throw new Error(JSON.stringify(made.problems));
  const sheet = structuredClone(made.sheet) as unknown as Sheet;
  change(sheet);
  return withDefaults(sheet);
}

/** Digital sensors switch when half their spot is covered: 9.5 mm from the middle of a 19 mm line. */
const digital = sheetWith((sheet) => {
  sheet.sensors.kind = 'digital';
});

describe('barNumbers', () => {
  it('of six digital sensors 10 mm apart, 75 mm ahead, over a 19 mm line', () => {
    const numbers = barNumbers(digital);
    // Outermost sensor at 25 mm, and half a line more.
    expect(numbers?.halfWidthMm).toBeCloseTo(34.5, 6);
    // Within 9.5 mm of a sensor lies no other (both 5 mm off: two; right below one: itself alone).
    expect(numbers).toMatchObject({ fewest: 1, most: 2, blindGapMm: 0 });
    // (75^2 + 34.5^2) / (2 * 34.5) = 6815.25 / 69
    expect(numbers?.tightestBendMm).toBeCloseTo(98.772, 3);
  });

  it('finds the blind gap of a sparse row', () => {
    const sparse = sheetWith((sheet) => {
      sheet.sensors.kind = 'digital';
      sheet.sensors.pitchMm = 25;
    });
    // 25 mm between sensors, of which each covers 9.5 mm.
    expect(barNumbers(sparse)).toMatchObject({
      fewest: 0,
      most: 1,
      blindGapMm: expect.closeTo(6, 6) as number,
    });
  });

  it('takes the nearer end of an uneven row', () => {
    const uneven = sheetWith((sheet) => {
      delete sheet.sensors.pitchMm;
      sheet.sensors.kind = 'digital';
      sheet.sensors.count = 3;
      sheet.sensors.positionsMm = [30, 5, -12];
    });
    expect(barNumbers(uneven)?.halfWidthMm).toBeCloseTo(12 + 9.5, 6);
  });

  it('says nothing of spots too wide for the line', () => {
    const blind = sheetWith((sheet) => {
      sheet.sensors.kind = 'digital';
      sheet.sensors.spotRadiusMm = 15;
      sheet.line.widthMm = 5;
    });
    expect(barNumbers(blind)).toBeUndefined();
    expect(feedbackAfter('/sensors/spotRadiusMm', blind)).toEqual([]);
  });
});

describe('gripSpeedMps', () => {
  it('is sqrt(0.7 * 9.80665 * 0.12) in a 120 mm bend', () => {
    expect(gripSpeedMps(0.7, 120)).toBeCloseTo(0.9076, 4);
  });
});

describe('feedbackAfter', () => {
  it('tells what the bar sees', () => {
    expect(feedbackAfter('/sensors/spotRadiusMm', digital)).toEqual([
      'The bar sees the line up to 34 mm to each side: 1 to 2 of 6 sensors at once, no blind gap.',
      'Tightest bend it can see: 99 mm. Yours, 120 mm, is in view.',
    ]);
  });

  it.each([
    // From 98.8 mm on in view; from 78.4 mm on 0.7 * 34.5 mm + sqrt(R^2 - 75^2) is 0.6 R or more.
    [99, 'Yours, 99 mm, is in view.'],
    [98, 'Yours, 98 mm, is followed by cutting it.'],
    [79, 'Yours, 79 mm, is followed by cutting it.'],
    [78, 'Yours, 78 mm, is too tight.'],
  ])('judges a bend of %d mm', (radiusMm, verdict) => {
    const bent = sheetWith((sheet) => {
      sheet.sensors.kind = 'digital';
      sheet.line.tightestRadiusMm = radiusMm;
    });
    expect(feedbackAfter('/sensors/spotRadiusMm', bent)[1]).toBe(
      `Tightest bend it can see: 99 mm. ${verdict}`,
    );
  });

  it('tells the speeds: pi * 42 mm * 682 rpm is 1.50 m/s', () => {
    expect(feedbackAfter('/drive/motor/stallCurrentA', digital)).toEqual([
      'Top speed 1.50 m/s at 6 V.',
      'In the 120 mm bend grip allows 0.91 m/s at most.',
    ]);
    const slow = sheetWith((sheet) => {
      sheet.drive.motor.noLoadRpm = 341;
    });
    expect(feedbackAfter('/drive/motor/stallCurrentA', slow)).toEqual([
      'Top speed 0.75 m/s at 6 V.',
      'Grip would allow 0.91 m/s in the 120 mm bend: the motors are the limit.',
    ]);
  });

  it('tells the speeds over the battery: 6.6, 6 and 5.2 of 6 V', () => {
    expect(feedbackAfter('/power/emptyV', digital)).toEqual([
      'Top speed 1.65 m/s full, 1.50 m/s nominal, 1.30 m/s empty.',
    ]);
  });

  it('tells the contrast, and that readings are only typical', () => {
    const typical = sheetWith(() => undefined);
    // 839 - 123 = 716; 716 / 1023 = 70 %
    expect(feedbackAfter('/sensors/calibration/line', typical)).toEqual([
      'Line and ground differ by 716 of 1023 counts (70 %).',
      'These are readings of a typical sensor: take your own before the first run, or choose the sweep.',
    ]);
    const own = sheetWith((sheet) => {
      sheet.sensors.calibration = {
        mode: 'stored',
        ground: [100, 100, 100, 100, 100, 220],
        line: Array<number>(6).fill(700),
      };
    });
    expect(feedbackAfter('/sensors/calibration/line', own)).toEqual([
      'Line and ground differ by 480 of 1023 counts (47 %).',
    ]);
  });

  it('tells that no pin is used twice, and not where one is', () => {
    expect(feedbackAfter('end of drive', digital)).toEqual(['13 pins, none of them used twice.']);
    const twice = sheetWith((sheet) => {
      sheet.start.buttonPin = 'A0';
    });
    expect(checkSheet(twice).problems).not.toEqual([]);
    expect(feedbackAfter('end of drive', twice)).toEqual([]);
  });

  it('is silent elsewhere', () => {
    expect(feedbackAfter('/name', digital)).toEqual([]);
  });
});
