/**
 * Failures as a person reads them and as JSON.
 *
 * A problem is one line: file, JSON pointer, what was found, what is allowed, what to do.
 */
import { EXIT, FairleadError, type ExitCode, type Problem } from '../sheet/problem.js';
import { visible } from '../sheet/words.js';

/** A failure in the form in which it is shown. */
export interface Failure {
  exitCode: ExitCode;
  /** What happened, in one line, where `problems` does not say it all. */
  message: string;
  file: string | undefined;
  problems: readonly Problem[];
}

/** Plain words for the errors of the operating system that the user can do something about. */
const SYSTEM_ERRORS: Readonly<Record<string, string>> = {
  ENOENT: 'there is no such file or folder. Check the path.',
  EACCES: 'access is denied. Check who may read and write it.',
  EPERM: 'the operation is not permitted. Check who may read and write it.',
  EROFS: 'the file system is read-only. Choose another folder.',
  ENOSPC: 'the disk is full. Make room; files written before are as they were.',
  EDQUOT: 'the disk quota is used up. Make room; files written before are as they were.',
  EISDIR: 'this is a folder where a file is expected.',
  ENOTDIR: 'a part of this path is a file where a folder is expected.',
  ENAMETOOLONG: 'the name is too long for the file system. Choose a shorter one.',
  EMFILE: 'too many files are open. Close other programs, or raise the limit (ulimit -n).',
};

/** One problem in one line, e.g. `cart.json /sensors/pitchMm: 95 mm is outside 3 to 30 mm. Measure ...`. */
export function problemLine(problem: Problem, file?: string): string {
  const place = [file, problem.pointer].filter(Boolean).join(' ');
  const { message, got, allowed, fix } = problem;
  const details = [
    got !== undefined && !message.includes(got) ? `found ${got}` : '',
    allowed !== undefined && !message.includes(allowed) ? `allowed: ${allowed}` : '',
  ].filter(Boolean);
  const found = details.length > 0 ? `${details.join(', ')}.` : '';
  const text = [message, found && `${found.charAt(0).toUpperCase()}${found.slice(1)}`, fix].filter(Boolean);
  return visible(`${place ? `${place}: ` : ''}${text.join(' ')}`);
}

function isSystemError(error: unknown): error is NodeJS.ErrnoException {
  return error instanceof Error && 'syscall' in error && 'code' in error;
}

/** Sorts whatever was thrown: an expected failure, a fault of the surroundings, or a defect of ours. */
export function toFailure(error: unknown): Failure {
  if (error instanceof FairleadError) {
    const { exitCode, message, file, problems } = error;
    return { exitCode, message, file, problems };
  }
  if (isSystemError(error) && error.code && error.code in SYSTEM_ERRORS) {
    const message = `${error.path ?? error.syscall ?? 'file'}: ${SYSTEM_ERRORS[error.code] ?? ''}`;
    return { exitCode: EXIT.badInput, message, file: error.path, problems: [] };
  }
  const text = error instanceof Error ? error.message : String(error);
  const message = `This is a defect of fairlead, not of your input: ${text}. Please report it with the command and the sheet; DEBUG=1 shows where it happened.`;
  return { exitCode: EXIT.defect, message, file: undefined, problems: [] };
}

/** The failure as text for stderr: a line a problem, the last one not ended. */
export function failureText(failure: Failure): string {
  const lines =
    failure.problems.length > 0
      ? failure.problems.map((problem) => problemLine(problem, failure.file))
      : [visible(failure.message)];
  return lines.join('\n');
}

/** The failure as the JSON document that `--json` promises; there is always at least one problem. */
export function failureJson(failure: Failure): { ok: false; problems: readonly Problem[] } {
  const { problems, message } = failure;
  return { ok: false, problems: problems.length > 0 ? problems : [{ pointer: '', message }] };
}
