import { testRules } from './rule-cases.js';

const DIGITAL = { '/sensors/kind': 'digital', '/sensors/pins': [3, 4, 11, 12, 'A0', 'A1'] };
const readings = (ground: number[], line: number[], mode = 'stored'): Record<string, unknown> => ({
  '/sensors/calibration': { mode, ground, line },
});

const MIXED = {
  '/sensors/kind': 'mixed',
  '/sensors/kinds': ['digital', 'analog', 'analog', 'analog', 'analog', 'digital'],
  '/sensors/pins': [3, 'A1', 'A2', 'A3', 'A4', 4],
};

testRules({
  'sensor-kinds': [
    {
      when: 'a mixed bar without its kinds',
      changes: { '/sensors/kind': 'mixed' },
      want: ['/sensors/kinds: A mixed bar needs the kind of each sensor.'],
    },
    {
      when: 'a mixed bar of one kind',
      changes: { ...MIXED, '/sensors/kinds': new Array<string>(6).fill('digital') },
      want: ['/sensors/kinds: Every sensor of the mixed bar is digital.'],
    },
    { when: 'digital sensors at the ends', changes: MIXED, want: [] },
  ],
  'sweep-sees-ground': [
    {
      when: 'analog sensors clear of the line',
      changes: { ...MIXED, '/sensors/calibration': undefined },
      want: [],
    },
    {
      when: 'all analog sensors over the line at the start',
      changes: {
        ...MIXED,
        '/sensors/kinds': ['digital', 'digital', 'analog', 'analog', 'digital', 'digital'],
        '/sensors/calibration': { mode: 'sweep' },
      },
      want: [
        '/sensors/calibration/mode: Sensor 3, the outermost analog one, sees the line on which the vehicle stands when a sweep begins; the sweep then cannot tell whether the line reads higher or lower.',
      ],
    },
  ],
  'calibration-contrast': [
    {
      when: 'stored mode without readings',
      changes: { '/sensors/calibration': { mode: 'stored' } },
      want: [
        '/sensors/calibration/ground: Calibration mode stored needs the readings; ground is missing.',
        '/sensors/calibration/line: Calibration mode stored needs the readings; line is missing.',
      ],
    },
    {
      when: 'a sweep with one list',
      changes: { '/sensors/calibration': { mode: 'sweep', ground: [1, 2, 3, 4, 5, 6] } },
      want: [
        '/sensors/calibration/line: Calibration mode sweep takes both or none of the readings; line is missing.',
      ],
    },
    {
      when: 'no calibration at all, which is a sweep',
      changes: { '/sensors/calibration': undefined },
      want: [],
    },
    {
      when: 'readings of a finer converter',
      changes: readings([492, 123, 123, 123, 123, 123], [3358, 839, 839, 839, 839, 839]),
      want: ['/sensors/calibration/line/0: 3358 counts is more than Uno can read: 0 to 1023 counts.'],
    },
    {
      when: 'a sensor that hardly tells line from ground',
      changes: readings([123, 123, 123, 123, 123, 123], [839, 839, 225, 839, 839, 123]),
      want: [
        '/sensors/calibration/line/2: Sensor 3 tells line from ground by 102 counts only; at least 103 counts are needed.',
        '/sensors/calibration/line/5: Sensor 6 tells line from ground by 0 counts only; at least 103 counts are needed.',
      ],
    },
    {
      when: 'the least contrast',
      changes: readings([123, 123, 123, 123, 123, 123], [226, 226, 226, 226, 226, 226]),
      want: [],
    },
    {
      when: 'one sensor with its readings swapped',
      changes: readings([123, 839, 123, 123, 123, 123], [839, 123, 839, 839, 839, 839]),
      want: [
        '/sensors/calibration/line/1: Over the line the reading of sensor 2 falls, while most others rise.',
      ],
    },
    {
      when: 'one sensor of six that does not read less',
      changes: readings([839, 839, 839, 839, 123, 839], [123, 123, 123, 123, 839, 123]),
      want: [
        '/sensors/calibration/line/4: Over the line the reading of sensor 5 rises, while most others fall.',
      ],
    },
    { when: 'digital sensors', changes: { ...DIGITAL, ...readings([1, 1], [1, 1]) }, want: [] },
  ],
  'calibration-polarity': [
    {
      when: 'a light line that reads less',
      changes: readings([839, 839, 839, 839, 839, 839], [123, 123, 123, 123, 123, 123]),
      want: ['/sensors/calibration/line: Readings over the light line are lower than over the ground.'],
    },
    {
      when: 'a dark line that reads more',
      changes: { '/line/polarity': 'dark-on-light' },
      want: ['/sensors/calibration/line: Readings over the dark line are higher than over the ground.'],
    },
    { when: 'no readings', changes: { '/sensors/calibration': { mode: 'sweep' } }, want: [] },
  ],
  'without-effect': [
    {
      when: 'readings of digital sensors',
      changes: DIGITAL,
      want: [
        '/sensors/calibration: Digital sensors have no readings to calibrate, so the calibration has no effect.',
      ],
    },
    {
      when: 'a level of analog sensors',
      changes: { '/sensors/lineLevel': 'low' },
      want: ['/sensors/lineLevel: The level over the line is for digital sensors, so it has no effect.'],
    },
    { when: 'neither', changes: {}, want: [] },
  ],
});
