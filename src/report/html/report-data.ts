/** What the report is made from: plain data, so that the same data gives the same bytes wherever the runs were driven. */
import type { Lane } from '../../course/lane.js';
import type { Design } from '../../design/design.js';
import type { RunResult, Trace } from '../../rehearsal/engine.js';
import type { StudyReport } from '../../rehearsal/study.js';
import type { RehearsalNames } from '../rehearsal-text.js';
import type { ErrorBand } from './error-band.js';

/** A run that is shown whole, and why this one. */
export interface ShownRun {
  why: string;
  result: RunResult & { trace: Trace };
}

export interface ReportData {
  names: RehearsalNames;
  /** Name of the sheet's file, without folders. */
  sheetFile: string;
  /** The sheet as read. */
  sheet: unknown;
  /** SHA-256 of the sheet's file, hexadecimal. */
  digest: string;
  design: Design;
  lane: Lane;
  report: StudyReport;
  shown: readonly ShownRun[];
  /** Error of all recorded runs over the lane. */
  band: ErrorBand;
}

/** The page's own style and script, as files hold them (templates/report). */
export interface ReportAssets {
  style: string;
  script: string;
}
