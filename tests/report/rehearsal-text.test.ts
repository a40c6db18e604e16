import { describe, expect, it } from 'vitest';
import { summarise } from '../../src/rehearsal/metrics.js';
import { rehearsalText, runSummary } from '../../src/report/rehearsal-text.js';
import { drive, lane } from './driven.js';

const slow = drive(0.3).result;
const fast = drive(1.45).result;
const names = { vehicle: 'tray-cart', course: 'lane.json', laps: 2 };

function textOf(results: (typeof slow)[]): string {
  return rehearsalText(summarise(results, 'twin', 5, lane.lengthM), lane, names);
}

describe('rehearsalText', () => {
  it('tells of one run', () => {
    expect(textOf([slow])).toMatch(
      new RegExp(
        '^tray-cart on lane\\.json, with the twin of the controller\n' +
          '2 laps of 5\\.28 m; the vehicle just as in the sheet\n\n' +
          'Finished +yes\n' +
          'Flying lap +17\\.\\d\\d s; 3\\.\\d\\d times the physical bound of 5\\.00 s\n' +
          'From standing +17\\.\\d\\d s\n' +
          'Lateral error +\\d\\.\\d mm rms, \\d+\\.\\d mm at most\n$',
      ),
    );
  });

  it('tells where and why a run was lost', () => {
    const text = textOf([fast]);
    expect(text).toMatch(/Finished +no, lost\n/);
    expect(text).toMatch(
      /\n +0 {2}\d\.\d\d s {2}lap 1, \d\.\d\d m, (left|right) bend of \d+ mm {2}off the lane\n$/,
    );
    expect(text).not.toContain('bound');
  });

  it('gives the traceback of a firmware that broke off', () => {
    const detail =
      'Traceback (most recent call last):\n  File "user_hooks.py", line 3, in sample\nValueError: 7\n';
    const text = textOf([{ ...fast, loss: { ...fast.loss!, reason: 'stopped', detail } }]);
    expect(text).toMatch(/What the firmware said, seed 0:\nTraceback[^]+in sample\nValueError: 7\n$/);
    expect(textOf([fast])).not.toContain('What the firmware said');
  });

  it('counts many, and says how to repeat a lost one alone', () => {
    const results = [
      slow,
      { ...fast, seed: 1 },
      { ...slow, seed: 2 },
      ...Array.from({ length: 12 }, (_, i) => ({ ...fast, seed: 3 + i })),
    ];
    const text = textOf(results);
    expect(text).toContain('15 vehicles drawn by seeds 0 to 14');
    expect(text).toMatch(/Finished +2 of 15: 1\.7 to 40\.5 % with 95 % confidence/);
    expect(text).toMatch(/Quickest, slowest +(\d+\.\d\d) s, \1 s/);
    expect(text).toContain('and 3 more');
    expect(text).toContain('--runs 1 --seed 1');
  });

  it('fits 80 columns', () => {
    for (const line of textOf([slow, fast]).split('\n')) expect(line.length).toBeLessThan(80);
  });
});

describe('runSummary', () => {
  it('says the same of one run in one line', () => {
    expect(runSummary(slow, 'twin', 5)).toMatch(
      /^twin, seed 0: finished; flying lap 17\.\d\d s, 3\.\d\d times the bound; lateral error .* at most$/,
    );
    expect(runSummary(fast, 'chip', 5)).toMatch(
      /^chip, seed 0: lost after \d\.\d\d s: off the lane; lateral error/,
    );
  });
});
