/** Runs the emitted control law on this machine, on given readings, under the sanitisers. */
import { spawnSync } from 'node:child_process';
import type { RenderedFile } from '../../src/firmware/render.js';
import { compileForHost } from './compile.js';

/**
 * @param folder for what is compiled
 * @param input as reference() makes it
 * @throws Error with the words of the sanitiser when it reports anything
 */
export function runOnHost(files: readonly RenderedFile[], folder: string, input: Int32Array): Int32Array {
  const program = compileForHost(files, folder);
  const { status, stdout, stderr } = spawnSync(program, {
    input: new Uint8Array(input.buffer),
    maxBuffer: 2 ** 28,
  });
  if (status !== 0 || stderr.length > 0)
    throw new Error(`The harness ended with ${status}: ${String(stderr)}`);
  const bytes = new Uint8Array(stdout);
  return new Int32Array(bytes.buffer, 0, Math.floor(bytes.length / 4));
}
