/** From a sheet's path to its design: the beginning of every command that needs the numbers. */
import type { Design } from '../design/design.js';
import { designFor } from '../pipeline.js';
import { loadSheet, type LoadedSheet } from '../sheet/load.js';
import { FairleadError } from '../sheet/problem.js';

/**
 * @throws FairleadError that names the file: bad input with all problems of the sheet, or no design meets it
 */
export async function loadDesign(path: string): Promise<LoadedSheet & { design: Design }> {
  const loaded = await loadSheet(path);
  try {
    return { ...loaded, design: designFor(loaded.sheet) };
  } catch (error) {
    if (!(error instanceof FairleadError) || error.file !== undefined) throw error;
    const { message, exitCode, problems } = error;
    throw new FairleadError(message, { exitCode, problems, file: path, cause: error });
  }
}
