import { PassThrough } from 'node:stream';
import { describe, expect, it } from 'vitest';
import { processIo } from '../../src/cli/io.js';

/** A stream that poses as a terminal (or not) and remembers what was written. */
function stream(isTTY: boolean) {
  const sink = new PassThrough() as unknown as NodeJS.WriteStream & { read(): Buffer | null };
  return Object.assign(sink, { isTTY, columns: 40 });
}

const written = (sink: { read(): Buffer | null }) => sink.read()?.toString() ?? '';

describe('processIo', () => {
  it('colours a terminal, and neither a pipe nor a terminal with NO_COLOR or TERM=dumb', () => {
    const styled = (isTerminal: boolean, environment: Record<string, string>) =>
      processIo(stream(isTerminal), stream(false), environment).style('red', 'lost');
    expect(styled(true, {})).toBe('\u001b[31mlost\u001b[39m');
    expect(styled(true, { NO_COLOR: '' })).toBe('\u001b[31mlost\u001b[39m');
    expect(styled(true, { NO_COLOR: '1' })).toBe('lost');
    expect(styled(true, { TERM: 'dumb' })).toBe('lost');
    expect(styled(false, {})).toBe('lost');
  });

  it('shows progress on a terminal in one line and takes it away before anything else is written', () => {
    const err = stream(true);
    const io = processIo(stream(false), err, {});
    io.progress('run 12 of 1000');
    io.stderr('1000 runs\n');
    expect(written(err)).toBe('run 12 of 1000\r\u001b[2K1000 runs\n');
  });

  it('cuts progress to the width of the terminal, so that the line can be taken away again', () => {
    const err = stream(true);
    processIo(stream(false), err, {}).progress('x'.repeat(100));
    expect(written(err)).toBe('x'.repeat(39));
  });

  it('takes a terminal that does not know its width for one of 80 characters', () => {
    const unsized = () => Object.assign(stream(true), { columns: 0 });
    const err = unsized();
    const io = processIo(unsized(), err, {});
    io.progress('x'.repeat(100));
    expect(written(err)).toBe('x'.repeat(79));
    expect(io.columns).toBe(80);
  });

  it('shows no progress where stderr is no terminal', () => {
    const err = stream(false);
    processIo(stream(true), err, {}).progress('run 12 of 1000');
    expect(written(err)).toBe('');
  });

  it('writes one JSON document', () => {
    const out = stream(false);
    processIo(out, stream(false), {}).json({ ok: true });
    expect(written(out)).toBe('{\n  "ok": true\n}\n');
  });
});
