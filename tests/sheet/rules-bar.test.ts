import { testRules } from './rule-cases.js';

// The demo bar: six sensors at 25, 15, 5, -5, -15, -25 mm, 75 mm ahead, spots of 4 mm radius, line of 19 mm.
// A quarter of a spot is covered while the line's edge is within 0.404 radii of its middle, so the reach of
// one sensor is 9.5 + 0.404 * 4 = 11.1 mm and the bar sees 36.1 mm to each side.
testRules({
  'sensor-counts': [
    {
      when: 'five pins for six sensors',
      changes: { '/sensors/pins': ['A0', 'A1', 'A2', 'A3', 'A4'] },
      want: ['/sensors/pins: There are 5 pins for 6 sensors.'],
    },
    {
      when: 'another count',
      changes: { '/sensors/count': 5 },
      want: [
        '/sensors/pins: There are 6 pins for 5 sensors.',
        '/sensors/calibration/ground: There are 6 readings for 5 sensors.',
        '/sensors/calibration/line: There are 6 readings for 5 sensors.',
      ],
    },
    {
      when: 'two positions for six sensors',
      changes: { '/sensors/pitchMm': undefined, '/sensors/positionsMm': [10, -10] },
      want: ['/sensors/positionsMm: There are 2 positions for 6 sensors.'],
    },
  ],
  'sensor-positions': [
    {
      when: 'spacing and positions',
      changes: { '/sensors/positionsMm': [25, 15, 5, -5, -15, -25] },
      want: ['/sensors/positionsMm: Both a spacing (pitchMm) and positions (positionsMm) are given.'],
    },
    {
      when: 'neither',
      changes: { '/sensors/pitchMm': undefined },
      want: ['/sensors: Neither a spacing (pitchMm) nor positions (positionsMm) are given.'],
    },
    {
      when: 'right to left',
      changes: { '/sensors/pitchMm': undefined, '/sensors/positionsMm': [-25, -15, -5, 5, 15, 25] },
      want: [1, 2, 3, 4, 5].map(
        (index) =>
          `/sensors/positionsMm/${index}: ${-25 + 10 * index} mm does not follow ${-35 + 10 * index} mm: sensors are listed left to right, left is positive, and two sit at least 3 mm apart.`,
      ),
    },
    {
      when: 'two sensors closer than they can be mounted',
      changes: { '/sensors/pitchMm': undefined, '/sensors/positionsMm': [25, 15, 5, 2.5, -15, -25] },
      want: [
        '/sensors/positionsMm/3: 2.5 mm does not follow 5 mm: sensors are listed left to right, left is positive, and two sit at least 3 mm apart.',
      ],
    },
    {
      when: 'measured from the end of the bar',
      changes: { '/sensors/pitchMm': undefined, '/sensors/positionsMm': [50, 40, 30, 20, 10, 0] },
      want: ['/sensors/positionsMm: All sensors are on one side of the centre line: 0 mm to 50 mm.'],
    },
    {
      when: 'an uneven row',
      changes: { '/sensors/pitchMm': undefined, '/sensors/positionsMm': [30, 15, 4, -4, -15, -30] },
      want: [],
    },
  ],
  'spot-fits-line': [
    {
      when: 'a spot of 15 mm on a line of 5 mm',
      // A strip of a third of the radius, in the middle: 4 * (1/6) / pi, less the little that the circle takes.
      changes: { '/sensors/spotRadiusMm': 15, '/line/widthMm': 5 },
      want: ['/sensors/spotRadiusMm: A line of 5 mm fills only 21 % of a spot of 15 mm radius.'],
    },
    {
      when: 'a rule table, which needs half of the spot',
      changes: { '/sensors/spotRadiusMm': 6.5, '/line/widthMm': 5, '/control/kind': 'rules' },
      want: ['/sensors/spotRadiusMm: A line of 5 mm fills only 48 % of a spot of 6.5 mm radius.'],
    },
    {
      when: 'the same with feedback',
      changes: { '/sensors/spotRadiusMm': 6.5, '/line/widthMm': 5 },
      want: [],
    },
  ],
  'line-cannot-hide': [
    {
      when: 'a spacing wider than line and spots',
      changes: { '/sensors/pitchMm': 23 },
      want: [
        '/sensors/pitchMm: Between sensors 23 mm apart a line of 19 mm can hide; at most 22.2 mm with this line, spot and controller.',
      ],
    },
    { when: 'a spacing just narrow enough', changes: { '/sensors/pitchMm': 22.2 }, want: [] },
    {
      when: 'digital sensors, which switch at half a spot',
      changes: { '/sensors/kind': 'digital', '/sensors/calibration': undefined, '/sensors/pitchMm': 19.5 },
      want: [
        '/sensors/pitchMm: Between sensors 19.5 mm apart a line of 19 mm can hide; at most 19 mm with this line, spot and controller.',
      ],
    },
    {
      when: 'one wide place in an uneven row',
      changes: { '/sensors/pitchMm': undefined, '/sensors/positionsMm': [40, 15, 5, -5, -15, -25] },
      want: [
        '/sensors/positionsMm/1: Between sensors 25 mm apart a line of 19 mm can hide; at most 22.2 mm with this line, spot and controller.',
      ],
    },
  ],
  'line-narrower-than-bar': [
    {
      when: 'a line as wide as the bar',
      changes: { '/line/widthMm': 60 },
      want: [
        '/line/widthMm: The line, 60 mm wide, covers the whole bar, which sees 58 mm from spot to spot.',
      ],
    },
    { when: 'a line just narrower', changes: { '/line/widthMm': 57 }, want: [] },
  ],
  'line-fits-bend': [
    {
      when: 'a bend tighter than the line is wide',
      changes: { '/line/widthMm': 50, '/line/tightestRadiusMm': 40 },
      want: ['/line/tightestRadiusMm: A bend of 40 mm is too tight for a line of 50 mm.'],
    },
  ],
});
