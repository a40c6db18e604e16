/** The engines by name. Each is loaded only when it is asked for: the chip and the interpreter are heavy. */
import type { Design } from '../design/design.js';
import type { SheetIdentity } from '../firmware/render.js';
import { EXIT, FairleadError } from '../sheet/problem.js';
import type { Engine, EngineName } from './engine.js';

export const ENGINE_NAMES = ['twin', 'chip', 'micropython'] as const satisfies readonly EngineName[];

/** The language whose firmware an engine runs; the twin stands for both. */
const RUNS = { chip: 'arduino', micropython: 'micropython' } as const;

/**
 * Makes ready the engine of that name for a design: compiles or loads what it runs.
 *
 * @throws FairleadError: bad input where the engine cannot run the design's firmware, tool missing where a compiler is
 */
export async function engineFor(name: EngineName, sheet: SheetIdentity, design: Design): Promise<Engine> {
  const { vehicle } = design;
  if (name !== 'twin' && RUNS[name] !== vehicle.language) {
    const fitting = ENGINE_NAMES.filter((other) => other === 'twin' || RUNS[other] === vehicle.language);
    throw new FairleadError(
      `The engine "${name}" runs ${RUNS[name]} firmware; the sheet's board ${vehicle.board.id} takes ${vehicle.language}. ` +
        `Use --on ${fitting.join(' or --on ')}.`,
      { exitCode: EXIT.badInput },
    );
  }
  switch (name) {
    case 'twin':
      return (await import('./twin-maker.js')).twinEngine(vehicle, design.controller);
    case 'chip':
      return (await import('./chip-engine.js')).chipEngine(sheet, design);
    case 'micropython':
      return (await import('./micropython-engine.js')).micropythonEngine(sheet, design);
  }
}
