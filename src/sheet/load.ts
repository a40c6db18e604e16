/** From a path to a checked sheet: what can be wrong with the file, then with the JSON, then with the sheet. */
import { createHash } from 'node:crypto';
import { readFile, stat } from 'node:fs/promises';
import { checkSheet } from './check.js';
import type { ResolvedSheet } from './defaults.js';
import { findJsonFault } from './json-text.js';
import { FairleadError, type Problem } from './problem.js';

/** A thousand times the size of an ordinary sheet. */
const MOST_BYTES = 1_000_000;

/** What every complaint about the file itself asks for. */
const WANTED = 'a JSON file';

/** A JSON file as read. */
export interface JsonFile {
  data: unknown;
  /** The text, without byte order mark. */
  text: string;
  /** SHA-256 of the file's bytes, in hex, as `sha256sum` prints it. */
  digest: string;
}

export interface LoadedSheet {
  /** With every default filled in. */
  sheet: ResolvedSheet;
  /** The parsed file as written. */
  data: unknown;
  text: string;
  digest: string;
  notes: Problem[];
}

/**
 * Reads and checks a build sheet.
 *
 * @throws FairleadError (bad input) with all problems at once: the file's, the JSON's, or the sheet's.
 */
export async function loadSheet(path: string): Promise<LoadedSheet> {
  const { data, text, digest } = await readSheetFile(path);
  const { sheet, problems, notes } = checkSheet(data);
  if (sheet === undefined)
    throw new FairleadError(`${path} is not a sound build sheet.`, { problems, file: path });
  return { sheet, data, text, digest, notes };
}

/** Reads a sheet's file without checking what it says; throws as `readJsonFile`. */
export function readSheetFile(path: string): Promise<JsonFile> {
  return readJsonFile(path, 'A new sheet is made with "fairlead survey".');
}

/**
 * Reads a JSON file of ours: a sheet or a course. `advice` is added where there is nothing to read.
 *
 * @throws FairleadError (bad input) if there is none, or it is no UTF-8 JSON of a sensible size.
 */
export async function readJsonFile(path: string, advice = ''): Promise<JsonFile> {
  const bytes = await readBytes(path, advice);
  const digest = createHash('sha256').update(bytes).digest('hex');
  const text = decoded(bytes, path);
  if (text.trim() === '') {
    const fix = `Check that this is the right file. ${advice}`.trim();
    throw unreadable(path, { message: `The file is empty; ${WANTED} is needed.`, got: 'empty', fix });
  }
  const fault = findJsonFault(text);
  if (fault) {
    const got = `line ${fault.line}, column ${fault.column}: ${fault.what}`;
    throw unreadable(path, {
      message: `This is not JSON: ${got}.`,
      got,
      allowed: 'JSON',
      fix: 'Correct that place.',
    });
  }
  return { data: JSON.parse(text), text, digest };
}

function unreadable(path: string, problem: Omit<Problem, 'pointer'>, cause?: unknown): FairleadError {
  return new FairleadError(`${path}: ${problem.message}`, {
    problems: [{ pointer: '', allowed: WANTED, ...problem }],
    file: path,
    cause,
  });
}

async function readBytes(path: string, advice: string): Promise<Buffer> {
  try {
    const found = await stat(path);
    if (found.isDirectory()) {
      throw unreadable(path, {
        message: `This is a folder; ${WANTED} is needed.`,
        got: 'a folder',
        fix: 'Name the file in it.',
      });
    }
    if (!found.isFile()) {
      throw unreadable(path, {
        message: `This is a device or pipe; ${WANTED} is needed.`,
        got: 'a device or pipe',
        fix: 'Save it as a file and name that.',
      });
    }
    if (found.size > MOST_BYTES) {
      const got = `${found.size} bytes`;
      const allowed = `at most ${MOST_BYTES} bytes`;
      const message = `The file has ${got}; ${allowed} are read.`;
      throw unreadable(path, { message, got, allowed, fix: 'Check that this is the right file.' });
    }
    return await readFile(path);
  } catch (error) {
    if (error instanceof FairleadError) throw error;
    throw unreadable(path, reasonOf(error, advice), error);
  }
}

function reasonOf(error: unknown, advice: string): Omit<Problem, 'pointer'> {
  const code = error instanceof Error && 'code' in error ? error.code : undefined;
  if (code === 'ENOENT') {
    const message = `There is no such file; ${WANTED} is needed.`;
    return { message, got: 'no such file', fix: `Check the path. ${advice}`.trim() };
  }
  if (code === 'EACCES' || code === 'EPERM') {
    const message = `Reading the file is not permitted; ${WANTED} is needed.`;
    return { message, got: 'not permitted', fix: 'Check its access rights.' };
  }
  const got = error instanceof Error ? error.message : String(error);
  return { message: `The file cannot be read: ${got}; ${WANTED} is needed.`, got, fix: 'Check the path.' };
}

function decoded(bytes: Buffer, path: string): string {
  const utf16 = (bytes[0] === 0xff && bytes[1] === 0xfe) || (bytes[0] === 0xfe && bytes[1] === 0xff);
  try {
    // A byte order mark of UTF-8 is dropped by the decoder; some editors write one.
    return new TextDecoder('utf-8', { fatal: true }).decode(bytes);
  } catch (error) {
    const got = utf16 ? 'UTF-16' : 'bytes that are no UTF-8';
    const message = `The file has ${got}; text in UTF-8 is needed.`;
    throw unreadable(path, { message, got, allowed: 'text in UTF-8', fix: 'Save it as UTF-8.' }, error);
  }
}
