/** The demo vehicle turns its wheels 11.4 times a second at full speed; an Uno counts 40 000 edges a second. */
import { testRules } from './rule-cases.js';

const single = (linesPerTurn: number) => ({
  '/encoders': { channels: 'single', linesPerTurn, left: { a: 3 }, right: { a: 4 } },
});
const pins = (channels: string, left: object, right: object) => ({
  '/encoders': { channels, linesPerTurn: 120, left, right },
});

testRules({
  'encoder-channels': [
    {
      when: 'quadrature without a second channel on the right',
      changes: pins('quadrature', { a: 3, b: 4 }, { a: 11 }),
      want: ['/encoders/right/b: Quadrature takes two channels; b of the right encoder is missing.'],
    },
    {
      when: 'a second channel too many on both sides',
      changes: pins('single', { a: 3, b: 4 }, { a: 11, b: 12 }),
      want: [
        '/encoders/left/b: A single channel takes one pin; b of the left encoder is too many.',
        '/encoders/right/b: A single channel takes one pin; b of the right encoder is too many.',
      ],
    },
    { when: 'quadrature with two', changes: pins('quadrature', { a: 3, b: 4 }, { a: 11, b: 12 }), want: [] },
    { when: 'one channel', changes: single(120), want: [] },
  ],
  'encoder-rate': [
    {
      when: 'more edges than an Uno counts',
      changes: single(2000),
      want: [
        '/encoders/linesPerTurn: At full speed both wheels give 90933 edges a second; Uno can count 40000 beside its other work.',
      ],
    },
    { when: 'just few enough', changes: single(879), want: [] },
  ],
  'encoder-resolution': [
    {
      when: 'less than two edges in 16 samples, half the time constant of the motor',
      changes: { ...single(4), '/drive/motor/noLoadRpm': 200 },
      want: [
        '/encoders/linesPerTurn: At full speed a wheel gives 0.8533 edges in 32 ms, the longest that the loop can wait beside this motor; that is too coarse for a speed.',
      ],
    },
    { when: 'four lines on a quick wheel', changes: single(4), want: [] },
    {
      when: 'as many lines as asked for',
      changes: { ...single(10), '/drive/motor/noLoadRpm': 200 },
      want: [],
    },
    { when: 'no encoders', changes: {}, want: [] },
  ],
});
