import { expect, test } from 'vitest';
import { compileCourse } from '../../src/course/lane.js';
import { courseNotes } from '../../src/rehearsal/course-fit.js';
import { demoVehicle } from '../design/demo-vehicle.js';

const vehicle = demoVehicle();
const straight = { straightMm: 500 };

test('a course within what the sheet announces has no notes', () => {
  const pieces = [
    straight,
    { radiusMm: 120, turnDeg: 90 },
    { gapMm: 40 },
    straight,
    { crossing: true as const },
    straight,
  ];
  expect(courseNotes(vehicle, compileCourse({ courseVersion: 1, pieces }))).toEqual([]);
});

test('each thing beyond the sheet is told with both figures', () => {
  const pieces = [
    straight,
    { radiusMm: 80, turnDeg: -90 },
    { gapMm: 40 },
    { gapMm: 20 },
    straight,
    { cornerDeg: -90 },
    straight,
    { crossing: true as const },
    straight,
  ];
  const lane = compileCourse({ courseVersion: 1, lineWidthMm: 25, pieces });
  const without = { ...vehicle, line: { ...vehicle.line, crossings: false } };
  expect(courseNotes(without, lane)).toEqual([
    "The course has a bend of 80 mm, the sheet's tightest (/line/tightestRadiusMm) is 120 mm.",
    "The course has a gap of 60 mm, the sheet's longest (/line/longestGapMm) is 40 mm.",
    'The course has a crossing, the sheet (/line/crossings) says there are none.',
    'The line of the course is 25 mm wide, that of the sheet (/line/widthMm) 19 mm.',
    'The course has a corner of 90 deg: it is taken by a search, not by following.',
  ]);
});
