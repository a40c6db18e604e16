import { testRules } from './rule-cases.js';

// The demo bar: six sensors at 25, 15, 5, -5, -15, -25 mm, 75 mm ahead, spots of 4 mm radius, line of 19 mm.
// A quarter of a spot is covered while the line's edge is within 0.404 radii of its middle, so the reach of
// one sensor is 9.5 + 0.404 * 4 = 11.1 mm and the bar sees 36.1 mm to each side.
testRules({
  'bend-in-view': [
    {
      when: 'a bar just within the bend of which it sees too little',
      // sqrt(60^2 - 58^2) + 0.7 * 16.1 = 15.4 + 11.3 = 26.6 mm of path, 0.44 of 60; at 64 mm 27.1 + 11.3 = 38.3, less than 0.6 * 64 = 38.4; at 65 mm 40.6, more than 39.
      changes: {
        '/sensors/aheadOfAxleMm': 58,
        '/line/tightestRadiusMm': 60,
        '/sensors/count': 2,
        '/sensors/pins': ['A0', 'A1'],
        '/sensors/calibration': undefined,
      },
      want: [
        '/line/tightestRadiusMm: In a bend of 60 mm the line leaves the bar, which sees 16 mm to the side; the tightest bend that this bar can follow is 65 mm.',
      ],
    },
    {
      when: 'a bar beyond the bend',
      // 0.7 * 36.1 = 25.3 mm; at 143 mm sqrt(143^2 - 130^2) + 25.3 = 84.9, less than 85.8; at 144 mm 87.2, more than 86.4.
      changes: { '/sensors/aheadOfAxleMm': 130 },
      want: [
        '/line/tightestRadiusMm: In a bend of 120 mm the bar, 130 mm ahead of the axle, is beyond the bend; the tightest bend that this bar can follow is 144 mm.',
      ],
    },
    {
      when: 'the bend that the message names',
      changes: { '/sensors/aheadOfAxleMm': 130, '/line/tightestRadiusMm': 144 },
      want: [],
    },
    {
      when: 'a bar wider than it is far ahead',
      changes: { '/sensors/aheadOfAxleMm': 30, '/line/tightestRadiusMm': 40 },
      want: [],
    },
  ],
  'bend-is-cut': [
    {
      when: 'a bar too far ahead to see the line of the bend from the line',
      // (100^2 + 36.1^2) / (2 * 36.1) = 156.5; path 0.7 * 36.1 + sqrt(120^2 - 100^2) = 91.6, so 28 mm inside.
      changes: { '/sensors/aheadOfAxleMm': 100 },
      want: [
        '/line/tightestRadiusMm: In a bend of 120 mm the axle runs about 28 mm inside the line, so that the line stays under the bar; from 157 mm on it follows the line itself.',
      ],
    },
    {
      when: 'the bend that the message names',
      changes: { '/sensors/aheadOfAxleMm': 100, '/line/tightestRadiusMm': 157 },
      want: [],
    },
    { when: 'a bar beyond the bend', changes: { '/sensors/aheadOfAxleMm': 130 }, want: [] },
  ],
  'gap-is-bridged': [
    {
      when: 'a long gap and a narrow bar',
      // tan 6 deg = 0.1051; half the bar 8 + 11.1 = 19.1 mm, so at most 19.1 / 0.1051 = 181 mm.
      changes: {
        '/line/longestGapMm': 300,
        '/sensors/count': 2,
        '/sensors/pitchMm': 16,
        '/sensors/pins': ['A0', 'A1'],
        '/sensors/calibration': undefined,
      },
      want: [
        '/line/longestGapMm: Over a gap of 300 mm the vehicle may drift 32 mm to the side (6 deg of heading error), but the bar sees only 19 mm to each side.',
      ],
    },
    {
      when: 'the gap that the message allows',
      changes: {
        '/line/longestGapMm': 181,
        '/sensors/count': 2,
        '/sensors/pitchMm': 16,
        '/sensors/pins': ['A0', 'A1'],
        '/sensors/calibration': undefined,
      },
      want: [],
    },
    { when: 'a long gap and the demo bar', changes: { '/line/longestGapMm': 300 }, want: [] },
  ],
});
