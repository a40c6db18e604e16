/** From a path to a lane: what can be wrong with the file, then with the JSON, then with the course. */
import { readJsonFile } from '../sheet/load.js';
import { FairleadError } from '../sheet/problem.js';
import { checkCourse } from './check-course.js';
import type { Course } from './course-types.js';
import { Lane } from './lane.js';

export interface LoadedCourse {
  course: Course;
  lane: Lane;
  text: string;
  /** SHA-256 of the file's bytes, in hex. */
  digest: string;
}

/**
 * Reads, checks and compiles a course.
 *
 * @throws FairleadError (bad input) with all problems at once: the file's, the JSON's, or the course's.
 */
export async function loadCourse(path: string): Promise<LoadedCourse> {
  const { data, text, digest } = await readJsonFile(path);
  const { course, problems } = checkCourse(data);
  if (course === undefined) {
    throw new FairleadError(`${path} is not a course that can be driven.`, { problems, file: path });
  }
  return { course, lane: new Lane(course), text, digest };
}
