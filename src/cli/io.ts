/**
 * The terminal, as commands see it: two writers, what each end is, and colour where it is wanted.
 *
 * Commands get an Io and never touch process.stdout themselves, so that tests can give them one of their own.
 */
import { styleText } from 'node:util';

export type Style = Parameters<typeof styleText>[0];

export interface Io {
  /** Writes results. The caller ends its lines. */
  stdout(text: string): void;
  /** Writes messages about the run: problems, notes, where files went. */
  stderr(text: string): void;
  /** Shows passing progress on stderr in one line; does nothing where stderr is no terminal. */
  progress(text: string): void;
  /** Writes one JSON document on stdout. */
  json(value: unknown): void;
  readonly isTerminalIn: boolean;
  readonly isTerminalOut: boolean;
  readonly isTerminalErr: boolean;
  /** Whether stdout takes colour: a terminal, and NO_COLOR unset or empty. */
  readonly color: boolean;
  /** Width of stdout in characters; 80 where it is no terminal. */
  readonly columns: number;
  /** Styles text for stdout; plain where `color` is false. */
  style(format: Style, text: string): string;
  /** Styles text for stderr; plain where stderr takes no colour. */
  styleErr(format: Style, text: string): string;
}

/** Erases the line that the cursor is in and returns to its start (ECMA-48: EL, CR). */
const CLEAR_LINE = '\r\u001b[2K';
const PLAIN_COLUMNS = 80;
/** We have looked at the stream ourselves; Node would look at stdout only. */
const UNASKED = { validateStream: false };

/** Width of a stream; a terminal that does not know its size says 0. */
function columnsOf(stream: NodeJS.WriteStream): number {
  return stream.isTTY && stream.columns > 0 ? stream.columns : PLAIN_COLUMNS;
}

function takesColor(stream: NodeJS.WriteStream, environment: NodeJS.ProcessEnv): boolean {
  return stream.isTTY && !environment['NO_COLOR'] && environment['TERM'] !== 'dumb';
}

/** The Io of this process. */
export function processIo(
  out: NodeJS.WriteStream = process.stdout,
  err: NodeJS.WriteStream = process.stderr,
  environment: NodeJS.ProcessEnv = process.env,
): Io {
  const color = takesColor(out, environment);
  const colorErr = takesColor(err, environment);
  let progressShown = false;

  const clearProgress = (): void => {
    if (progressShown) err.write(CLEAR_LINE);
    progressShown = false;
  };

  return {
    stdout(text) {
      clearProgress();
      out.write(text);
    },
    stderr(text) {
      clearProgress();
      err.write(text);
    },
    progress(text) {
      if (!err.isTTY) return;
      clearProgress();
      if (text === '') return;
      err.write(text.slice(0, columnsOf(err) - 1));
      progressShown = true;
    },
    json(value) {
      clearProgress();
      out.write(`${JSON.stringify(value, null, 2)}\n`);
    },
    isTerminalIn: process.stdin.isTTY,
    isTerminalOut: out.isTTY,
    isTerminalErr: err.isTTY,
    color,
    columns: columnsOf(out),
    style: (format, text) => (color ? styleText(format, text, UNASKED) : text),
    styleErr: (format, text) => (colorErr ? styleText(format, text, UNASKED) : text),
  };
}
