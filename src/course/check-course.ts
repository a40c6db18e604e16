/** The whole check of a course: the schema first, then, on a course that fits it, its geometry. */
import type { Problem } from '../sheet/problem.js';
import { schemaProblems } from '../sheet/schema-problems.js';
import type { Course } from './course-types.js';
import { laneProblems } from './lane-problems.js';

export interface CourseCheck {
  /** Present if there is no problem. */
  course?: Course;
  problems: Problem[];
}

/** Checks parsed JSON of any kind. Pure; never throws. */
export function checkCourse(data: unknown): CourseCheck {
  const misfits = schemaProblems('course', data);
  if (misfits.length > 0) return { problems: misfits };
  const course = data as Course;
  const problems = laneProblems(course);
  return problems.length > 0 ? { problems } : { course, problems };
}
