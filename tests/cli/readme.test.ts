/** What the README tells a person to type, typed. */
import { mkdtemp, readFile, rm, symlink } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, expect, it } from 'vitest';
import { ROOT, runFairlead } from './run-fairlead.js';

let folder = '';
beforeAll(async () => {
  folder = await mkdtemp(join(tmpdir(), 'fairlead-readme-'));
  await symlink(join(ROOT, 'examples'), join(folder, 'examples'));
});
afterAll(() => rm(folder, { recursive: true }));

/** The commands of the quick walk, without the comments behind them. */
async function quickWalk(): Promise<string[][]> {
  const readme = await readFile(join(ROOT, 'README.md'), 'utf8');
  const block = /## A quick walk.*?```\n(.*?)```/s.exec(readme)?.[1] ?? '';
  const lines = block.split('\n').map((line) => line.replace(/\s*#.*/, ''));
  return lines.filter((line) => line.startsWith('fairlead ')).map((line) => line.split(' ').slice(1));
}

it('can be followed from the questionnaire to the chip', { timeout: 180_000 }, async () => {
  const commands = (await quickWalk()).filter(([command]) => command !== 'demo');
  expect(commands.map(([command]) => command)).toEqual([
    'survey',
    'check',
    'derive',
    'render',
    'rehearse',
    'rehearse',
  ]);
  for (const words of commands) {
    // There is nobody to answer here.
    const unattended = words[0] === 'survey' ? [...words, '--defaults'] : words;
    const { exitCode, stderr } = await runFairlead(unattended, { folder });
    expect({ words, exitCode, stderr }).toEqual({ words, exitCode: 0, stderr: '' });
  }
});
