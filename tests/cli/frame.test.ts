import { readFile } from 'node:fs/promises';
import { describe, expect, it } from 'vitest';
import { exitOf, ROOT, runFairlead, startFairlead } from './run-fairlead.js';

describe('fairlead', () => {
  it('prints its version', async () => {
    const { version } = JSON.parse(await readFile(`${ROOT}/package.json`, 'utf8')) as { version: string };
    expect(await runFairlead(['--version'])).toEqual({ exitCode: 0, stdout: `${version}\n`, stderr: '' });
  });

  it('helps on stdout, with every command, examples and exit codes', async () => {
    const { exitCode, stdout, stderr } = await runFairlead(['--help']);
    expect(exitCode).toBe(0);
    expect(stderr).toBe('');
    for (const command of ['survey', 'check', 'derive', 'render', 'rehearse', 'demo']) {
      expect(stdout).toMatch(new RegExp(`^  ${command} `, 'm'));
    }
    expect(stdout).toContain('Examples:\n  fairlead survey cart.json');
    expect(stdout).toContain('5 a needed tool is missing');
  });

  it('refuses an unknown command on stderr with exit 2 and names the nearest', async () => {
    const { exitCode, stdout, stderr } = await runFairlead(['chekc', 'cart.json']);
    expect(exitCode).toBe(2);
    expect(stdout).toBe('');
    expect(stderr).toBe("error: unknown command 'chekc'\n(Did you mean check?)\n");
  });

  it('refuses an unknown option with exit 2 and names the nearest', async () => {
    const { exitCode, stdout, stderr } = await runFairlead(['check', 'cart.json', '--jsno']);
    expect(exitCode).toBe(2);
    expect(stdout).toBe('');
    expect(stderr).toBe("error: unknown option '--jsno'\n(Did you mean --json?)\n");
  });

  it('puts a usage error into one JSON document where JSON is asked for', async () => {
    const { exitCode, stdout, stderr } = await runFairlead(['check', '--json']);
    expect(exitCode).toBe(2);
    expect(stderr).toBe('');
    expect(JSON.parse(stdout)).toEqual({
      ok: false,
      problems: [{ pointer: '', message: "missing required argument 'sheet'" }],
    });
  });

  it('ends quietly when the reader of its output goes away', async () => {
    const child = startFairlead(['--help']);
    let stderr = '';
    child.stderr.on('data', (chunk: Buffer) => (stderr += chunk.toString()));
    child.stdout.destroy();
    expect(await exitOf(child)).toBe(0);
    expect(stderr).toBe('');
  });
});

describe.each(['survey', 'check', 'derive', 'render', 'rehearse', 'demo'])(
  'fairlead %s --help',
  (command) => {
    it('says what the command does, with an example and --json', async () => {
      const { exitCode, stdout, stderr } = await runFairlead([command, '--help']);
      expect(exitCode).toBe(0);
      expect(stderr).toBe('');
      expect(stdout).toContain(`Usage: fairlead ${command}`);
      expect(stdout).toMatch(/--json/);
      expect(stdout).toMatch(new RegExp(`Examples?:\\n  fairlead ${command}`));
    });
  },
);
