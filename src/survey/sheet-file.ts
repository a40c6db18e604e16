/** The sheet as a file: its text, what a new one changes in an old one, and writing it with the schema beside it. */
import { readFile } from 'node:fs/promises';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';
import writeFileAtomic from 'write-file-atomic';
import { visible } from '../sheet/words.js';
import { describeValue } from '../sheet/words.js';
import { type Json, type JsonObject, leavesOf, sameJson, valueAt } from './json-tree.js';
import { plainly } from './question.js';
import { nodeAt } from './schema-node.js';

const SCHEMA_NAME = 'sheet.schema.json';
/** Same place from src/ and from dist/. */
const SCHEMA_FILE = fileURLToPath(new URL(`../../schemas/${SCHEMA_NAME}`, import.meta.url));
const PRINT_WIDTH = 110;

/** The text of a sheet's file. The same sheet gives the same text. */
export async function sheetText(sheet: JsonObject): Promise<string> {
  const { format } = await import('prettier');
  return format(JSON.stringify(sheet), { parser: 'json', printWidth: PRINT_WIDTH });
}

/** The text of a file, or undefined where there is none. */
export async function textOf(file: string): Promise<string | undefined> {
  try {
    return await readFile(file, 'utf8');
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code === 'ENOENT') return undefined;
    throw error;
  }
}

/** Writes a file unless it has that text already: the whole text or, where something fails, nothing. */
async function writeChanged(file: string, text: string): Promise<void> {
  if ((await textOf(file)) === text) return;
  try {
    await writeFileAtomic(file, text);
  } catch (error) {
    // The system names a passing file, or none.
    if (error instanceof Error) Object.assign(error, { path: file });
    throw error;
  }
}

/** Writes the sheet, and a copy of the schema beside it for editors. */
export async function writeSheet(file: string, sheet: JsonObject): Promise<void> {
  await writeChanged(join(dirname(file), SCHEMA_NAME), await readFile(SCHEMA_FILE, 'utf8'));
  await writeChanged(file, await sheetText(sheet));
}

/** What a new sheet changes in an old one, a line for each value: "Line width: 19 mm -> 25 mm". */
export function changesBetween(before: Json, after: Json): string[] {
  const old = new Map(leavesOf(before));
  const now = new Map(leavesOf(after));
  const pointers = [...old.keys(), ...[...now.keys()].filter((pointer) => !old.has(pointer))];
  return pointers
    .filter((pointer) => !sameJson(old.get(pointer), now.get(pointer)))
    .map((pointer) => {
      const { title, unit } = labelOf(pointer);
      return `${title}: ${shown(old.get(pointer), unit)} -> ${shown(now.get(pointer), unit)}`;
    });
}

const IS_MOTOR_PIN = /^(\/drive\/driver\/(?:left|right))\//;

function labelOf(pointer: string): { title: string; unit?: string } {
  const motor = IS_MOTOR_PIN.exec(pointer)?.[1];
  try {
    const node = nodeAt(pointer);
    return motor === undefined ? node : { title: `${nodeAt(motor).title}, ${node.title}` };
  } catch (error) {
    if (!(error instanceof RangeError)) throw error;
    return { title: visible(pointer) };
  }
}

function shown(value: Json | undefined, unit: string | undefined): string {
  if (value === undefined) return 'not given';
  if (Array.isArray(value)) return value.map(plainly).join(' ');
  return typeof value === 'number' ? describeValue(value, unit) : plainly(value);
}

/** The name of a vehicle that a file name suggests, if it can be one. */
export function nameFrom(file: string): string | undefined {
  const name = /([^/\\]+?)(\.json)?$/.exec(file)?.[1] ?? '';
  return new RegExp(nodeAt('/name').pattern ?? '').test(name) ? name : undefined;
}

/** The value of a sheet's name, for a file name. */
export function fileNameFor(sheet: JsonObject): string {
  const name = valueAt(sheet, '/name');
  return `${typeof name === 'string' ? name : 'sheet'}.json`;
}
