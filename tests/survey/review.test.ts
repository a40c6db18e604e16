import { describe, expect, it } from 'vitest';
import { checkSheet } from '../../src/sheet/check.js';
import { assemble } from '../../src/survey/assemble.js';
import { begin, factsOf, type FlowState, REVIEW, visibleEntries } from '../../src/survey/flow.js';
import { actionQuestion, changeQuestion, concerned, reviewLines } from '../../src/survey/review.js';
import { sheetFromAnswers } from '../../src/survey/answers-file.js';
import type { Answers } from '../../src/survey/facts.js';

const made = sheetFromAnswers({}, {});
const base = 'sheet' in made ? made.sheet : {};
const stateWith = (answers: Answers): FlowState => begin(base, answers, REVIEW);
const checkOf = (state: FlowState) => checkSheet(assemble(factsOf(state)));

function linesOf(state: FlowState, columns = 80): string[] {
  return reviewLines(state, checkOf(state), { columns, style: (_format, text) => text });
}

describe('reviewLines', () => {
  it('lists every answer under its group, numbered, with its unit', () => {
    const state = stateWith({ '/line/widthMm': 25 });
    const lines = linesOf(state);
    expect(lines.slice(0, 8)).toEqual([
      '',
      'Vehicle and board',
      '  1 Vehicle name: tray-cart',
      '  2 Board: uno',
      '',
      'Line',
      '  3 Line polarity: light-on-dark',
      '  4 Line width: 25 mm',
    ]);
    const numbered = lines.filter((line) => /^ {1,2}\d+ /.test(line));
    expect(numbered).toHaveLength(visibleEntries(state).length);
  });

  it('tells a problem below the answer that it concerns', () => {
    const lines = linesOf(stateWith({ '/power/emptyV': 7 }));
    const at = lines.findIndex((line) => line.endsWith('Empty voltage: 7 V'));
    expect(lines[at + 1]).toBe('    ! Empty at 7 V is above the nominal 6 V. Give the voltage at which the');
  });

  it('tells what a reading of one sensor lacks below the readings', () => {
    const lines = linesOf(stateWith({ '/sensors/calibration/line': [839, 839, 150, 839, 839, 839] }));
    const at = lines.findIndex((line) => line.includes('Readings over line: 839 839 150 839 839 839 counts'));
    expect(lines[at + 1]).toMatch(/^ {4}! Sensor 3 tells line from ground by 27 counts only/);
  });

  it('shows the pins of the plan', () => {
    expect(linesOf(stateWith({}))).toContain('    Sensor pins, left to right: A0 A1 A2 A3 A4 A5');
  });

  it('fits into 40 columns', () => {
    const widths = linesOf(stateWith({ '/power/emptyV': 7 }), 40).map((line) => line.length);
    expect(Math.max(...widths)).toBeLessThan(40);
  });
});

describe('concerned', () => {
  const entries = visibleEntries(stateWith({}));
  it.each([
    ['/line/widthMm', '/line/widthMm'],
    ['/sensors/calibration/line/3', '/sensors/calibration/line'],
    ['/sensors/pins/2', '#pins'],
    ['/drive/driver/left/pwm', '#pins'],
    ['/start/buttonPin', '#pins'],
    ['/target/language', '/target/board'],
    ['/power', '/power/nominalV'],
    ['/tolerances/gripPercent', undefined],
    ['', undefined],
  ])('%s is about %s', (pointer, id) => {
    expect(concerned(pointer, entries)?.id).toBe(id);
  });
});

describe('actionQuestion', () => {
  const labels = (state: FlowState) =>
    actionQuestion(state, checkOf(state), 'cart.json').choices?.map(({ label }) => label);

  it('offers to write a sound sheet', () => {
    expect(labels(stateWith({}))).toEqual(['write', 'change', 'stop']);
  });

  it('offers the way to each problem instead', () => {
    const state = stateWith({ '/power/emptyV': 7, '/sensors/pitchMm': 30 });
    expect(labels(state)).toEqual(['go to Sensor spacing', 'go to Empty voltage', 'change', 'stop']);
    const { title, choices } = actionQuestion(state, checkOf(state), 'cart.json');
    expect(title).toBe('2 problems to be solved');
    expect(choices?.[0]?.value).toBe('/sensors/pitchMm');
  });
});

describe('changeQuestion', () => {
  const question = changeQuestion(stateWith({}));

  it('takes a number, a name, or a part of a name', () => {
    expect(question.read('2')).toEqual({ value: '/target/board' });
    expect(question.read('line width')).toEqual({ value: '/line/widthMm' });
    expect(question.read('Grip')).toEqual({ value: '/drive/gripCoefficient' });
    expect(question.read('spac')).toEqual({ value: '/sensors/pitchMm' });
  });

  it('asks which one is meant', () => {
    expect(question.read('voltage')).toEqual({
      problem: 'Which one: 22 Rated voltage, 31 Nominal voltage, 32 Full voltage, 33 Empty voltage?',
    });
    expect(question.read('99')).toEqual({ problem: 'No answer has that number or name.' });
    expect(question.read('0')).toEqual({ problem: 'No answer has that number or name.' });
  });
});
