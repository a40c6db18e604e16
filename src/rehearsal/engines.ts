/** The engines by name, and which of them a board's firmware can run on. */
import type { Design } from '../design/design.js';
import type { SheetIdentity } from '../firmware/render.js';
import { EXIT, FairleadError } from '../sheet/problem.js';
import type { Engine, EngineName } from './engine.js';
import { type EngineParts, enginePartsFor, engineFrom } from './engine-parts.js';

export const ENGINE_NAMES = ['twin', 'chip', 'micropython'] as const satisfies readonly EngineName[];

/** The language whose firmware an engine runs; the twin stands for both. */
const RUNS = { chip: 'arduino', micropython: 'micropython' } as const;

/**
 * Makes ready the engine of that name for a design: compiles or loads what it runs.
 *
 * @throws FairleadError: bad input where the engine cannot run the design's firmware, tool missing where a compiler is
 */
export async function engineFor(name: EngineName, sheet: SheetIdentity, design: Design): Promise<Engine> {
  return engineFrom(await enginePartsOf(name, sheet, design));
}

/** The same as plain data, for worker threads. */
export async function enginePartsOf(
  name: EngineName,
  sheet: SheetIdentity,
  design: Design,
): Promise<EngineParts> {
  const { vehicle } = design;
  if (name !== 'twin' && RUNS[name] !== vehicle.language) {
    const fitting = ENGINE_NAMES.filter((other) => other === 'twin' || RUNS[other] === vehicle.language);
    throw new FairleadError(
      `The engine "${name}" runs ${RUNS[name]} firmware; the sheet's board ${vehicle.board.id} takes ${vehicle.language}. ` +
        `Use --on ${fitting.join(' or --on ')}.`,
      { exitCode: EXIT.badInput },
    );
  }
  return enginePartsFor(name, sheet, design);
}
