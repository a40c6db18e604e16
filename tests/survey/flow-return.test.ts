import { describe, expect, it } from 'vitest';
import { checkSheet } from '../../src/sheet/check.js';
import { accept, back, begin, current, factsOf, jump, REVIEW } from '../../src/survey/flow.js';
import { until, answering, sheetOf } from './flow-steps.js';

describe('from the review', () => {
  it('one answer is changed and the review comes back', () => {
    const changed = accept(jump(until(REVIEW), '/line/widthMm'), 25);
    expect(changed.at).toBe(REVIEW);
    expect(sheetOf(changed)).toHaveProperty('line.widthMm', 25);
  });

  it('back leads to the review', () => {
    expect(back(jump(until(REVIEW), '/power/fullV')).at).toBe(REVIEW);
  });

  it('questions that an answer raises follow it', () => {
    const uneven = accept(jump(until(REVIEW), '#row'), 'uneven');
    expect(uneven.at).toBe('/sensors/positionsMm');
    expect(accept(uneven, [25, 15, 5, -5, -15, -25]).at).toBe(REVIEW);
  });

  it('pins by hand are asked one by one, as often as wanted', () => {
    let state = until(REVIEW);
    for (const first of ['A1', 'A2']) {
      state = accept(jump(state, '#pins'), 'by-hand');
      expect(state.at).toBe('/sensors/pins/0');
      state = until(REVIEW, accept(state, first));
      expect(sheetOf(state)).toHaveProperty('sensors.pins.0', first);
      expect(checkSheet(sheetOf(state)).problems).toEqual([]);
    }
  });
});

describe('resuming', () => {
  it('goes on at the question that was open, with all answers', () => {
    const open = answering('/line/widthMm', 25);
    const resumed = begin({}, open.answers, open.at);
    expect(resumed).toEqual(open);
  });

  it('forgets answers that no question accepts, and a place that is none', () => {
    const resumed = begin({}, { '/line/widthMm': 'wide', '/target/board': 'uno' }, '/no/such');
    expect(resumed.answers).toEqual({ '/target/board': 'uno' });
    expect(resumed.at).toBe('/name');
  });

  it('at the review asks first for what is missing', () => {
    const end = until(REVIEW);
    const answers = Object.fromEntries(Object.entries(end.answers).filter(([id]) => id !== '/power/fullV'));
    expect(begin({}, answers, REVIEW).at).toBe('/power/fullV');
  });
});

describe('a sheet at hand', () => {
  const base = sheetOf(until(REVIEW, answering('/line/widthMm', 25)));
  const detailed = {
    ...base,
    tolerances: { gripPercent: 30 },
    drive: { ...(base['drive'] as object), trim: { leftPercent: 97 } },
  };

  it('goes to the review without a question, and says the same there', () => {
    const state = begin(detailed, {}, REVIEW);
    expect(state.at).toBe(REVIEW);
    expect(sheetOf(state)).toEqual(detailed);
  });

  it('offers its values', () => {
    const state = until('/line/widthMm', begin(detailed));
    expect(current(state)?.make(factsOf(state)).defaultValue).toBe(25);
  });

  it('keeps details that are not asked for', () => {
    const changed = accept(jump(begin(detailed, {}, REVIEW), '/line/widthMm'), 30);
    expect(sheetOf(changed)).toMatchObject({
      line: { widthMm: 30 },
      tolerances: { gripPercent: 30 },
      drive: { trim: { leftPercent: 97 } },
    });
  });

  it('has its pins proposed anew when another board is chosen', () => {
    const state = begin(detailed, {}, REVIEW);
    const changed = until(REVIEW, accept(jump(state, '/target/board'), 'esp32'));
    expect(checkSheet(sheetOf(changed)).problems).toEqual([]);
    expect(sheetOf(changed)).not.toHaveProperty('sensors.pins.0', 'A0');
  });

  it('that is faulty is asked about where it is', () => {
    const faulty = { ...base, line: { ...(base['line'] as object), widthMm: 'wide' } };
    expect(begin(faulty, {}, REVIEW).at).toBe('/line/widthMm');
  });
});
