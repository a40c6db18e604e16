import { createHash } from 'node:crypto';
import { chmod, mkdir, mkdtemp, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { loadSheet, readJsonFile } from '../../src/sheet/load.js';
import { EXIT, FairleadError } from '../../src/sheet/problem.js';
import { changedSheet } from './example-sheet.js';

const EXAMPLES = fileURLToPath(new URL('../../examples/tray-cart/', import.meta.url));
const SOUND = JSON.stringify(changedSheet());

let folder = '';
beforeAll(async () => {
  folder = await mkdtemp(join(tmpdir(), 'sheet-load-'));
});
afterAll(() => rm(folder, { recursive: true, force: true }));

async function file(name: string, content: string | Uint8Array): Promise<string> {
  const path = join(folder, name);
  await writeFile(path, content);
  return path;
}

async function failureOf(path: string): Promise<FairleadError> {
  const error: unknown = await loadSheet(path).then(
    () => undefined,
    (reason: unknown) => reason,
  );
  if (error instanceof FairleadError) return error;
  throw new Error(`no FairleadError: ${String(error)}`);
}

const utf16 = (text: string): Uint8Array =>
  Buffer.concat([Buffer.from([0xff, 0xfe]), Buffer.from(text, 'utf16le')]);

test.each<[name: string, content: string | Uint8Array, message: RegExp, fix: RegExp]>([
  ['empty.json', '', /^The file is empty; a JSON file is needed\.$/, /"fairlead survey"/],
  ['blank.json', ' \n\t\n', /^The file is empty; a JSON file is needed\.$/, /"fairlead survey"/],
  [
    'huge.json',
    ' '.repeat(1_000_001),
    /^The file has 1000001 bytes; at most 1000000 bytes are read\.$/,
    /right file/,
  ],
  [
    'comma.json',
    '{\n  "name": "x",\n}',
    /^This is not JSON: line 3, column 1: found "}" where a key/,
    /Correct that place/,
  ],
  [
    'twice.json',
    '{"name": "x", "name": "y"}',
    /line 1, column 15: the key "name" stands here a second time\.$/,
    /Correct/,
  ],
  ['deep.json', '['.repeat(100_000), /nesting is deeper than 64 levels\.$/, /Correct/],
  ['utf16.json', utf16(SOUND), /^The file has UTF-16; text in UTF-8 is needed\.$/, /^Save it as UTF-8\.$/],
  [
    'latin1.json',
    Buffer.from('{"name": "caf\xe9"}', 'latin1'),
    /^The file has bytes that are no UTF-8; text in UTF-8 is needed\.$/,
    /Save it as UTF-8/,
  ],
  [
    'binary.json',
    Buffer.from([0x89, 0x50, 0x4e, 0x47, 0, 0]),
    /^The file has bytes that are no UTF-8; text in UTF-8 is needed\.$/,
    /Save it as UTF-8/,
  ],
  [
    'list.json',
    '[]',
    /^a list of 0 entries is not an object\.$/,
    /^Write an object with the keys sheetVersion,/,
  ],
  ['text.json', '"sheet"', /^"sheet" is not an object\.$/, /^Write an object/],
  ['null.json', 'null', /^null is not an object\.$/, /^Write an object/],
])('%s is bad input', async (name, content, message, fix) => {
  const path = await file(name, content);
  const failure = await failureOf(path);
  expect(failure.exitCode).toBe(EXIT.badInput);
  expect(failure.file).toBe(path);
  expect(failure.problems).toHaveLength(1);
  expect(failure.problems[0]?.pointer).toBe('');
  expect(failure.problems[0]?.message).toMatch(message);
  expect(failure.problems[0]?.fix).toMatch(fix);
  expect(failure.problems[0]?.got).toBeTypeOf('string');
  expect(failure.problems[0]?.allowed).toBeTypeOf('string');
});

test('a missing file, a folder, a path through a file, a device', async () => {
  const inner = join(folder, 'inner');
  await mkdir(inner);
  const aFile = await file('a-file.json', SOUND);
  const messages = await Promise.all(
    [join(folder, 'none.json'), inner, join(aFile, 'x.json'), '/dev/null', 'nul\0byte'].map(async (path) => {
      const failure = await failureOf(path);
      expect(failure.exitCode).toBe(EXIT.badInput);
      return failure.problems[0]?.message;
    }),
  );
  expect(messages.slice(0, 2)).toEqual([
    'There is no such file; a JSON file is needed.',
    'This is a folder; a JSON file is needed.',
  ]);
  expect(messages[2]).toMatch(/^The file cannot be read: ENOTDIR/);
  expect(messages[3]).toBe('This is a device or pipe; a JSON file is needed.');
  expect(messages[4]).toMatch(/^The file cannot be read: .*null bytes/);
});

test('a file that may not be read says so', async () => {
  const path = await file('secret.json', SOUND);
  await chmod(path, 0);
  const readable = await readJsonFile(path).then(
    () => true,
    () => false,
  );
  // The superuser may read everything.
  expect(readable).toBe(process.getuid?.() === 0);
  if (!readable)
    expect((await failureOf(path)).problems[0]?.message).toBe(
      'Reading the file is not permitted; a JSON file is needed.',
    );
});

test('all problems of a sheet come at once, with the file', async () => {
  const path = await file(
    'two.json',
    JSON.stringify(changedSheet({ '/sensors/pitchMm': 95, '/power/fullV': 'x' })),
  );
  const failure = await failureOf(path);
  expect(failure.file).toBe(path);
  expect(failure.problems.map(({ pointer }) => pointer)).toEqual(['/sensors/pitchMm', '/power/fullV']);
});

test('a byte order mark of UTF-8 is dropped from the text and counts in the digest', async () => {
  const bytes = Buffer.from(`\ufeff${SOUND}`);
  const loaded = await loadSheet(await file('bom.json', bytes));
  expect(loaded.text).toBe(SOUND);
  expect(loaded.digest).toBe(createHash('sha256').update(bytes).digest('hex'));
  expect(loaded.data).toEqual(changedSheet());
});

test.each(['tray-cart.json', 'tray-cart-esp32.json', 'tray-cart-pico.json'])(
  'example %s is sound',
  async (name) => {
    const { sheet, notes } = await loadSheet(join(EXAMPLES, name));
    expect(sheet.name).toBe(name.replace('.json', ''));
    expect(notes).toHaveLength(name === 'tray-cart.json' ? 2 : 0);
  },
);
