import { describe, expect, it } from 'vitest';
import { assemble } from '../../src/survey/assemble.js';
import { Facts } from '../../src/survey/facts.js';
import { checkSheet } from '../../src/sheet/check.js';
import { accept, back, begin, canGoBack, current, factsOf, jump, REVIEW } from '../../src/survey/flow.js';
import { until, answering, ids, sheetOf } from './flow-steps.js';

describe('on the way out', () => {
  it('begins with the name and ends at the review, with a sound sheet from defaults alone', () => {
    const start = begin({});
    expect(start.at).toBe('/name');
    expect(canGoBack(start)).toBe(false);
    const end = until(REVIEW, start);
    expect(end.reviewing).toBe(true);
    expect(checkSheet(sheetOf(end)).problems).toEqual([]);
  });

  it.each(['uno', 'nano', 'esp32'])('takes %s with six analog sensors', (board) => {
    const end = until(REVIEW, answering('/target/board', board));
    expect(checkSheet(sheetOf(end)).problems).toEqual([]);
    expect(sheetOf(end)['target']).toEqual({
      board,
      language: board === 'esp32' ? 'micropython' : 'arduino',
    });
  });

  it('goes back question by question, across groups, and keeps the answers', () => {
    const there = answering('/line/widthMm', 25);
    expect(there.at).toBe('/line/tightestRadiusMm');
    const back1 = back(there);
    expect(back1.at).toBe('/line/widthMm');
    expect(current(back1)?.make(factsOf(back1)).defaultValue).toBe(25);
    const back3 = back(back(back1));
    expect(back3.at).toBe('/target/board');
    expect(canGoBack(back3)).toBe(true);
    expect(back(back(back3)).at).toBe('/name');
  });
});

describe('conditional questions', () => {
  it('ask digital sensors for their level, not for readings', () => {
    const digital = answering('/sensors/kind', 'digital');
    expect(ids(digital)).toContain('/sensors/lineLevel');
    expect(ids(digital).filter((id) => id.startsWith('/sensors/calibration'))).toEqual([]);
    const sheet = sheetOf(until(REVIEW, digital));
    expect(sheet['sensors']).not.toHaveProperty('calibration');
    expect(checkSheet(sheet)).toMatchObject({ problems: [] });
  });

  it('ask for readings only where they are stored', () => {
    const sweep = answering('/sensors/calibration/mode', 'sweep');
    expect(sweep.at).toBe('/drive/trackWidthMm');
    expect(sheetOf(sweep)['sensors']).toMatchObject({ calibration: { mode: 'sweep' } });
  });

  it('ask for a spacing or for positions', () => {
    const uneven = answering('#row', 'uneven');
    expect(uneven.at).toBe('/sensors/positionsMm');
    expect(ids(uneven)).not.toContain('/sensors/pitchMm');
    const placed = accept(uneven, [30, 15, 5, -5, -15, -30]);
    expect(sheetOf(placed)['sensors']).toMatchObject({ positionsMm: [30, 15, 5, -5, -15, -30] });
    expect(sheetOf(placed)['sensors']).not.toHaveProperty('pitchMm');
  });

  it('ask for a standby pin only where the driver has one', () => {
    expect(ids(answering('/drive/driver/scheme', 'dual-pwm'))).not.toContain('#standby');
    const standby = until(REVIEW, answering('#standby', true));
    expect(sheetOf(standby)).toHaveProperty('drive.driver.standbyPin');
    expect(checkSheet(sheetOf(standby)).problems).toEqual([]);
  });
});

describe('a stop input', () => {
  it('gets a pin where it is wanted, and loses it where it is not any more', () => {
    const wanted = sheetOf(until(REVIEW, answering('#stopInput', true)));
    expect(wanted).toHaveProperty('stopPin');
    expect(checkSheet(wanted).problems).toEqual([]);
    expect(assemble(new Facts(wanted, { '#stopInput': false }))).not.toHaveProperty('stopPin');
    expect(sheetOf(until(REVIEW, answering('#stopInput', false)))).not.toHaveProperty('stopPin');
  });
});

describe('a board with too few pins', () => {
  const pico = until('#fit', answering('/target/board', 'pico'));

  it('is found out as soon as the sensors are counted', () => {
    expect(pico.at).toBe('#fit');
    const question = current(pico)?.make(factsOf(pico));
    expect(question?.why).toBe('Pico has 3 analog pins (GP26 to GP28), too few for 6 analog sensors.');
    expect(question?.choices?.map(({ label }) => label)).toEqual([
      'take digital sensors',
      'take board uno',
      'take board nano',
      'take board mega2560',
      'take board leonardo',
      'take board esp32',
      'take 3 sensors',
    ]);
  });

  it.each([
    [{ '/sensors/kind': 'digital' }, 'pico', 'digital', 6],
    [{ '/target/board': 'nano' }, 'nano', 'analog', 6],
    [{ '/sensors/count': 3 }, 'pico', 'analog', 3],
  ])('goes on with %j', (way, board, kind, count) => {
    const next = accept(pico, way);
    expect(next.at).toBe('#row');
    const sheet = sheetOf(until(REVIEW, next));
    expect(sheet).toMatchObject({ target: { board }, sensors: { kind, count } });
    // Three sensors see less far to the side; that is another matter.
    const problems = checkSheet(sheet).problems.filter(({ pointer }) => pointer !== '/line/tightestRadiusMm');
    expect(problems).toEqual([]);
  });

  it('can be gone back from', () => {
    expect(back(pico).at).toBe('/sensors/count');
  });
});

describe('an answer that overtakes others', () => {
  it('drops the accepted pins when the board changes, and asks for them again', () => {
    const end = until(REVIEW);
    const changed = accept(jump(end, '/target/board'), 'esp32');
    expect(changed.answers).not.toHaveProperty('#pins');
    // Readings were counted by another converter.
    expect(changed.at).toBe('/sensors/calibration/ground');
    const done = until(REVIEW, changed);
    expect(checkSheet(sheetOf(done)).problems).toEqual([]);
    expect(sheetOf(done)).toHaveProperty('sensors.calibration.ground.0', Math.round(0.12 * 4095));
  });

  it('drops a list that has no longer one value for each sensor', () => {
    const end = until(REVIEW, answering('/sensors/calibration/ground', [1, 2, 3, 4, 5, 6]));
    const fewer = accept(jump(end, '/sensors/count'), 4);
    expect(fewer.answers).not.toHaveProperty('/sensors/calibration/ground');
    expect(fewer.at).toBe('/sensors/calibration/ground');
  });

  it('keeps a single reading for all sensors', () => {
    const end = until(REVIEW, answering('/sensors/calibration/ground', 130));
    const fewer = accept(jump(end, '/sensors/count'), 4);
    expect(sheetOf(fewer)).toHaveProperty('sensors.calibration.ground', [130, 130, 130, 130]);
  });
});
