/**
 * What can be wrong with a person's input, and the one error class that carries it.
 *
 * A problem says where (file and JSON pointer), what was found with its unit, what is allowed and what to do.
 */

/** Exit codes of the command line; every failure has exactly one. */
export const EXIT = {
  done: 0,
  defect: 1,
  badInput: 2,
  noDesign: 3,
  filesDiffer: 4,
  toolMissing: 5,
  /** By Ctrl-C: 128 and the number of the signal, as shells count. */
  interrupted: 130,
} as const;

export type ExitCode = (typeof EXIT)[keyof typeof EXIT];

/** A change of one number in a sheet. */
export interface SheetChange {
  /** JSON pointer of the field. */
  pointer: string;
  from: number;
  to: number;
  /** Unit of both, "" where there is none. */
  unit: string;
}

/** One thing wrong with the input. */
export interface Problem {
  /** JSON pointer (RFC 6901) into the file, "" for the whole. */
  pointer: string;
  /** One sentence: what is wrong. */
  message: string;
  /** What was found, with its unit. */
  got?: string;
  /** What is allowed, with its unit. */
  allowed?: string;
  /** What to do about it. */
  fix?: string;
  /** Changes, each of which alone does it, the smallest first. */
  changes?: SheetChange[];
}

/** An expected failure: reported without a stack, ends the process with its exit code. */
export class FairleadError extends Error {
  override readonly name = 'FairleadError';
  readonly exitCode: ExitCode;
  readonly problems: readonly Problem[];
  /** The file that the pointers point into, where there is one. */
  readonly file: string | undefined;

  constructor(
    message: string,
    options: { exitCode?: ExitCode; problems?: readonly Problem[]; file?: string; cause?: unknown } = {},
  ) {
    super(message, options.cause === undefined ? undefined : { cause: options.cause });
    this.exitCode = options.exitCode ?? EXIT.badInput;
    this.problems = options.problems ?? [];
    this.file = options.file;
  }
}
