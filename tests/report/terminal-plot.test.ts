import { describe, expect, it } from 'vitest';
import { terminalPlot } from '../../src/report/terminal-plot.js';
import { drive } from './driven.js';

const slow = drive(0.3);
const fast = drive(1.45);

describe('terminalPlot', () => {
  it.each([
    [80, true, 79],
    [80, false, 79],
    [200, true, 79],
    [60, true, 59],
    [30, false, 40],
  ])('fits a terminal of %i columns (unicode: %s)', (columns, unicode, most) => {
    const lines = terminalPlot(slow.run, { columns, unicode }).split('\n');
    const captions = /^(Driven path|Lateral error)/;
    const widest = Math.max(...lines.map((line) => (captions.test(line) ? 0 : line.length)));
    expect(widest).toBeLessThanOrEqual(most);
    expect(lines.length).toBeLessThan(36);
  });

  it('is plain ASCII where the terminal takes no more', () => {
    expect(terminalPlot(slow.run, { columns: 80, unicode: false })).toMatch(/^[\n -~]*$/);
  });

  it('draws the lane in its shape: wider than high, the start at the bottom', () => {
    const lines = terminalPlot(slow.run, { columns: 80, unicode: false }).split('\n');
    const map = lines.slice(1, lines.indexOf(''));
    const start = map.findIndex((line) => line.includes('S'));
    expect(start).toBeGreaterThan(map.length * 0.6);
    expect(map[start]).toMatch(/S.*\+.*g/);
    expect(lines[0]).toMatch(/^Driven path: 1\.\d\d m by 1\.\d\d m {3}S start {2}\+ crossing {2}g gap$/);
  });

  it('marks where a run was lost, and only then', () => {
    expect(fast.run.loss).toBeDefined();
    const text = terminalPlot(fast.run, { columns: 80, unicode: true });
    expect(text.match(/X/g)).toHaveLength(2);
    expect(text).toContain('X lost');
    expect(terminalPlot(slow.run, { columns: 80, unicode: true })).not.toContain('X');
  });

  it('gives the range of the error and of time', () => {
    const text = terminalPlot(slow.run, { columns: 80, unicode: true });
    expect(text).toContain(`+${(1000 * slow.result.maxLateralM).toFixed(1)} `);
    expect(text.trimEnd()).toMatch(new RegExp(` ${slow.result.timeS.toFixed(1)}$`));
  });
});
