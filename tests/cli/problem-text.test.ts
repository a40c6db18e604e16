import { describe, expect, it } from 'vitest';
import { failureJson, failureText, problemLine, toFailure } from '../../src/cli/problem-text.js';
import { EXIT, FairleadError } from '../../src/sheet/problem.js';

const pitch = {
  pointer: '/sensors/pitchMm',
  message: '95 mm is outside 3 to 30 mm.',
  got: '95 mm',
  allowed: '3 to 30 mm',
  fix: 'Measure centre to centre between neighbouring sensors.',
};

describe('problemLine', () => {
  it('says file, pointer, what was found, what is allowed and what to do', () => {
    expect(problemLine(pitch, 'tray-cart.json')).toBe(
      'tray-cart.json /sensors/pitchMm: 95 mm is outside 3 to 30 mm. Measure centre to centre between neighbouring sensors.',
    );
  });

  it('adds what was found and what is allowed where the sentence leaves them out', () => {
    expect(problemLine({ ...pitch, message: 'The pitch does not fit.' })).toBe(
      '/sensors/pitchMm: The pitch does not fit. Found 95 mm, allowed: 3 to 30 mm. Measure centre to centre between neighbouring sensors.',
    );
  });

  it('shows control characters and text-reordering characters instead of sending them to the terminal', () => {
    const line = problemLine(
      { pointer: '/name', message: 'odd name: \u001b[2J\u202egnp\r\nok\ud800' },
      'a\u0007.json',
    );
    expect(line).toBe('a\\u{7}.json /name: odd name: \\u{1b}[2J\\u{202e}gnp\\u{d}\\u{a}ok\\u{d800}');
  });
});

describe('toFailure', () => {
  it('keeps the exit code and the problems of an expected failure', () => {
    const error = new FairleadError('one problem', {
      exitCode: EXIT.noDesign,
      problems: [pitch],
      file: 'c.json',
    });
    expect(toFailure(error)).toEqual({
      exitCode: 3,
      message: 'one problem',
      file: 'c.json',
      problems: [pitch],
    });
  });

  it('takes a full disk for a fault of the surroundings, in plain words', () => {
    const full = Object.assign(new Error('ENOSPC: no space left on device, write'), {
      code: 'ENOSPC',
      syscall: 'write',
      path: '/tray/constants.h',
    });
    expect(toFailure(full)).toMatchObject({
      exitCode: 2,
      message: '/tray/constants.h: the disk is full. Make room; files written before are as they were.',
    });
  });

  it('calls anything else a defect of ours', () => {
    const failure = toFailure(new TypeError('x is not a function'));
    expect(failure.exitCode).toBe(1);
    expect(failure.message).toBe(
      'This is a defect of fairlead, not of your input: x is not a function. ' +
        'Please report it with the command and the sheet; DEBUG=1 shows where it happened.',
    );
  });
});

describe('failure output', () => {
  it('lists every problem on a line of its own', () => {
    const second = { pointer: '/name', message: 'The name is empty.' };
    const failure = toFailure(
      new FairleadError('two problems', { problems: [pitch, second], file: 'c.json' }),
    );
    const lines = failureText(failure).split('\n');
    expect(lines).toHaveLength(2);
    expect(lines[0]).toContain('c.json /sensors/pitchMm: 95 mm');
    expect(lines[1]).toBe('c.json /name: The name is empty.');
  });

  it('gives JSON at least one problem, also where the failure is a single sentence', () => {
    expect(failureJson(toFailure(new FairleadError('c.json is empty.')))).toEqual({
      ok: false,
      problems: [{ pointer: '', message: 'c.json is empty.' }],
    });
  });
});
