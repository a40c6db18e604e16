import { testRules } from './rule-cases.js';

// The demo cart's top speed: pi * 0.042 m * 682 / 60 s * 6 V / 6 V = 1.4998 m/s.
const classes = (
  ...list: [name: string, minRadiusMm: number, speedMps: number][]
): Record<string, unknown> => ({
  '/speeds/classes': list.map(([name, minRadiusMm, speedMps]) => ({ name, minRadiusMm, speedMps })),
});

testRules({
  'voltage-order': [
    {
      when: 'empty above nominal',
      changes: { '/power/emptyV': 6.5 },
      want: ['/power/emptyV: Empty at 6.5 V is above the nominal 6 V.'],
    },
    {
      when: 'all the wrong way round',
      changes: { '/power': { nominalV: 6, fullV: 5, emptyV: 7 } },
      want: [
        '/power/emptyV: Empty at 7 V is above the nominal 6 V.',
        '/power/fullV: Full at 5 V is below the nominal 6 V.',
      ],
    },
    { when: 'a mains supply', changes: { '/power': { nominalV: 6, fullV: 6, emptyV: 6 } }, want: [] },
  ],
  'start-duty': [
    {
      when: 'a duty that an empty battery takes over half',
      // 45 % * 6 V / 5.2 V = 51.9 %; 50 % * 5.2 / 6 = 43.3 %.
      changes: { '/drive/motor/startDutyPercent': 45 },
      want: [
        '/drive/motor/startDutyPercent: With the battery at 5.2 V the wheels need 52 % duty merely to turn.',
      ],
    },
    { when: 'the most', changes: { '/drive/motor/startDutyPercent': 43 }, want: [] },
  ],
  'top-speed': [
    {
      when: 'the speed of the motor before its gearbox',
      changes: { '/drive/motor/noLoadRpm': 9000 },
      want: ['/drive/motor/noLoadRpm: 9000 rpm on wheels of 42 mm at 6 V would be 19.79 m/s.'],
    },
    {
      when: 'a motor for 48 V',
      changes: { '/drive/motor/ratedVoltageV': 48, '/drive/motor/noLoadRpm': 100 },
      want: ['/drive/motor/noLoadRpm: 100 rpm on wheels of 42 mm at 6 V would be 0.02749 m/s.'],
    },
    { when: 'four times the demo speed', changes: { '/drive/motor/noLoadRpm': 2728 }, want: [] },
  ],
  'class-bends': [
    {
      when: 'a radius and a sharpness, and neither',
      changes: {
        '/speeds/classes': [
          { name: 'wide', speedMps: 0.8 },
          {
            name: 'bend',
            minRadiusMm: 120,
            sharpness: { turnDeg: 90, withinMm: 188 },
            speedMps: 0.5,
          },
        ],
      },
      want: [
        '/speeds/classes/0: Class "wide" has neither of a radius (minRadiusMm) and a sharpness.',
        '/speeds/classes/1: Class "bend" has both of a radius (minRadiusMm) and a sharpness.',
      ],
    },
    {
      // a quarter turn of 119.7 mm radius is 188 mm long
      when: 'one by radius, one by sharpness',
      changes: {
        '/speeds/classes': [
          { name: 'wide', minRadiusMm: 500, speedMps: 0.8 },
          { name: 'bend', sharpness: { turnDeg: 90, withinMm: 188 }, speedMps: 0.5 },
        ],
      },
      want: [],
    },
  ],
  'speed-classes': [
    {
      when: 'two names that the firmware cannot tell apart',
      changes: classes(['tight bend', 100, 0.4], ['Tight-bend', 300, 0.8]),
      want: ['/speeds/classes/1/name: Class "Tight-bend" has the name of class 1, "tight bend".'],
    },
    {
      when: 'radii that rise, fall and repeat',
      changes: classes(['a', 100, 0.4], ['b', 300, 0.8], ['c', 200, 0.6], ['d', 200, 0.7]),
      want: [
        '/speeds/classes/2/minRadiusMm: 200 mm after 300 mm: the radii of the classes have to rise one by one.',
        '/speeds/classes/3/minRadiusMm: 200 mm after 200 mm: the radii of the classes have to rise one by one.',
      ],
    },
    {
      when: 'no class for the tightest bend',
      changes: classes(['wide', 500, 0.8], ['bend', 150, 0.5]),
      want: [
        '/speeds/classes/1/minRadiusMm: No class serves the tightest bend of 120 mm: the tightest class begins at 150 mm.',
      ],
    },
    {
      when: 'more than the motors give',
      changes: classes(['bend', 120, 0.5], ['straight', 1000, 1.6]),
      want: ['/speeds/classes/1/speedMps: Class "straight" asks for 1.6 m/s, but the motors reach 1.5 m/s.'],
    },
    { when: 'falling radii', changes: classes(['wide', 500, 0.8], ['bend', 120, 0.5]), want: [] },
    { when: 'rising radii', changes: classes(['bend', 100, 0.5], ['wide', 500, 0.8]), want: [] },
    { when: 'one class', changes: classes(['all', 40, 0.3]), want: [] },
  ],
  'slow-class': [
    {
      when: 'a speed under the start duty',
      changes: classes(['crawl', 100, 0.1], ['wide', 500, 0.8]),
      want: [
        '/speeds/classes/0/speedMps: Class crawl drives at 0.1 m/s, 7 % of the top speed, which is less than the start duty of 10 %: the wheels may run by jerks.',
      ],
    },
    { when: 'a speed above it', changes: classes(['walk', 100, 0.16]), want: [] },
    { when: 'computed classes', changes: {}, want: [] },
  ],
  'motor-overvoltage': [
    {
      when: 'three cells of lithium on a 6 V motor',
      changes: { '/power': { nominalV: 11.1, fullV: 12.6, emptyV: 9.6 } },
      want: ["/power/fullV: The full battery, 12.6 V, is 2.1 times the motor's rated 6 V."],
    },
    { when: 'one and a half times', changes: { '/power/fullV': 9 }, want: [] },
  ],
});
