import { describe, expect, it } from 'vitest';
import { Facts } from '../../src/survey/facts.js';
import { classesQuestion, positionsQuestion, readingsQuestion, splitValues } from '../../src/survey/lists.js';

const six = new Facts({}, {});
const three = new Facts({}, { '/sensors/count': 3, '#row': 'uneven' });
const ground = '/sensors/calibration/ground';

describe('splitValues', () => {
  it.each([
    ['25 15 -5', ['25', '15', '-5']],
    ['25, 15, -5', ['25', '15', '-5']],
    ['25,15,-5', ['25', '15', '-5']],
    ['1,5 0,5', ['1,5', '0,5']],
    ['25; 15', ['25', '15']],
    ['2.5 cm 1.5 cm', ['2.5 cm', '1.5 cm']],
    ['2.5 1.5 cm', ['2.5 cm', '1.5 cm']],
    ['1in -1in', ['1in', '-1in']],
    ['', []],
  ])('%s', (text, values) => {
    expect(splitValues(text)).toEqual(values);
  });
});

describe('readings', () => {
  const question = readingsQuestion(ground, six);

  it('are one for all sensors or one for each', () => {
    expect(question.read('123')).toEqual({ value: 123 });
    expect(question.read('120 121 122 123 124 125')).toEqual({ value: [120, 121, 122, 123, 124, 125] });
    expect(question.read('120 121')).toEqual({
      problem: '2 readings for 6 sensors; allowed: one for all, or 6 with blanks between.',
    });
  });

  it('stay within what the board can read', () => {
    expect(question.read('1500')).toEqual({
      problem:
        "1500 counts is outside 0 to 1023 counts. Give the readings as the board's converter counts them.",
    });
    const pico = new Facts({}, { '/target/board': 'pico' });
    expect(readingsQuestion(ground, pico).read('1500')).toEqual({ value: 1500 });
  });

  it('offer typical ones: light reads more, 12 % and 82 % of 1023', () => {
    const dark = new Facts({}, { '/line/polarity': 'dark-on-light' });
    expect(readingsQuestion(ground, six).defaultValue).toBe(123);
    expect(readingsQuestion('/sensors/calibration/line', six).defaultValue).toBe(839);
    expect(readingsQuestion(ground, dark).defaultValue).toBe(839);
  });

  it('of a sheet are offered as long as they fit its sensors and its board', () => {
    const base = {
      target: { board: 'uno' },
      sensors: { count: 3, calibration: { ground: [100, 100, 101] } },
    };
    expect(readingsQuestion(ground, new Facts(base, {})).defaultValue).toEqual([100, 100, 101]);
    expect(readingsQuestion(ground, new Facts(base, { '/sensors/count': 4 })).defaultValue).toBe(123);
    expect(readingsQuestion(ground, new Facts(base, { '/target/board': 'esp32' })).defaultValue).toBe(491);
  });
});

describe('positions', () => {
  const question = positionsQuestion('/sensors/positionsMm', three);

  it('take units and begin with an even row', () => {
    expect(question.defaultValue).toEqual([10, 0, -10]);
    expect(question.read('1.2 0 -1.2 cm')).toEqual({ value: [12, 0, -12] });
    expect(question.read('1in 0 -1in')).toEqual({ value: [25.4, 0, -25.4] });
  });

  it('are as many as the sensors', () => {
    expect(question.read('10 -10')).toEqual({
      problem: '2 positions for 3 sensors; allowed: 3, leftmost first.',
    });
    expect(question.read('10 0 -300')).toEqual({
      problem:
        "-300 mm is outside -250 to 250 mm. Measure each sensor's centre from the centre line of the vehicle.",
    });
  });
});

describe('speed classes', () => {
  const question = classesQuestion('/speeds/classes', six);
  const classes = [
    { name: 'wide', minRadiusMm: 400, speedMps: 0.9 },
    { name: 'bend 2', minRadiusMm: 120, speedMps: 0.5 },
  ];

  it('are computed, or written in one line', () => {
    expect(question.read('auto')).toEqual({ value: 'auto' });
    expect(question.read('wide 40 cm 0.9 m/s; bend 2 120 0.5')).toEqual({ value: classes });
    expect(question.read(question.show(classes))).toEqual({ value: classes });
  });

  it('may be told by sharpness', () => {
    const sharp = [
      { name: 'wide', minRadiusMm: 400, speedMps: 0.9 },
      { name: 'tight', sharpness: { turnDeg: 90, withinMm: 190 }, speedMps: 0.5 },
    ];
    expect(question.read('wide 400 0.9; tight 90 deg in 19 cm 0.5 m/s')).toEqual({ value: sharp });
    expect(question.read('wide 400 0.9; tight 90 in 190 0.5')).toEqual({ value: sharp });
    expect(question.read(question.show(sharp))).toEqual({ value: sharp });
    expect(question.read('tight 270 deg in 190 mm 0.5')).toMatchObject({
      problem: expect.stringContaining('270 deg is outside 1 to 180 deg') as string,
    });
  });

  it('say how they are written', () => {
    expect(question.read('fast')).toEqual({
      problem:
        '"fast" is no speed class. Write name, smallest radius or sharpest bend, speed; for example: wide 400 mm 0.9 m/s; tight 90 deg in 190 mm 0.5 m/s.',
    });
    expect(question.read('wide 10 mm 0.9')).toMatchObject({
      problem: expect.stringContaining('10 mm is outside 40 to 100000 mm') as string,
    });
  });
});
