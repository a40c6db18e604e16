/**
 * A study: many runs of one vehicle on one course, described by plain data, so that it can be spread over worker threads and
 * machines. Its outcome is a function of the description and of the runs' results in the order of their seeds, wherever these were driven.
 */
import { Lane } from '../course/lane.js';
import type { Course } from '../course/course-types.js';
import { courseNotes } from './course-fit.js';
import type { EngineName, RunResult } from './engine.js';
import type { EngineParts } from './engine-parts.js';
import type { Fault } from './fault.js';
import { summarise, type RehearsalReport } from './metrics.js';
import { lapEndM } from './run-monitor.js';
import { vehicleBound } from './runner.js';

export interface Study {
  parts: EngineParts;
  course: Course;
  laps: number;
  /** Injected into every run. */
  faults?: readonly Fault[];
}

/** What the outcome needs to know of a study beside the results. */
export interface StudyFacts {
  engine: EngineName;
  course: Course;
  laps: number;
  boundLapS: number;
  /** Length of a lap, m. */
  lapM: number;
  notes: string[];
  faults?: readonly Fault[];
}

export type StudyReport = RehearsalReport & { notes: string[] };

export function studyFacts({ parts, course, laps, faults }: Study): StudyFacts {
  const lane = new Lane(course);
  const { vehicle } = parts;
  return {
    engine: parts.name,
    course,
    laps,
    boundLapS: vehicleBound(vehicle, lane, laps).lapS,
    lapM: lapEndM(lane, vehicle.bar.aheadM),
    notes: courseNotes(vehicle, lane),
    ...(faults && { faults }),
  };
}

/** What `rehearse --json` gives, from the results in the order of their seeds. */
export function studyReport(facts: StudyFacts, results: readonly RunResult[]): StudyReport {
  const { engine, boundLapS, lapM, notes } = facts;
  return { ...summarise(results, engine, boundLapS, lapM), notes };
}
