/** Rehearses the rendered MicroPython files themselves, in the real interpreter on a virtual chip wired to the plant. */
import { type FirmwareDesign, type SheetIdentity, renderFirmware } from '../firmware/render.js';
import type { Vehicle } from '../vehicle/vehicle.js';
import type { Engine, RunResult, RunSetup } from './engine.js';
import { RESET_CAUSE } from './micropython-chip.js';
import type { PythonFile } from './micropython-interpreter.js';
import { runProgram } from './micropython-program.js';
import { MicroPythonRun } from './micropython-run.js';

export class MicroPythonEngine implements Engine {
  readonly name = 'micropython';

  /** @param files as they lie on the board: main.py and its modules */
  constructor(
    readonly files: readonly PythonFile[],
    private readonly vehicle: Vehicle,
  ) {}

  async run(setup: RunSetup): Promise<RunResult> {
    const run = new MicroPythonRun(this.vehicle, setup);
    const { board } = this.vehicle;
    const end = await runProgram(this.files, board, run);
    if (setup.faults === undefined || end.by !== 'reset') return run.result(end);
    // the board starts anew and shows why it stands
    run.afterReset();
    const supply = setup.faults.some(({ kind }) => kind === 'supply');
    await runProgram(this.files, board, run, supply ? RESET_CAUSE.powerOn : RESET_CAUSE.watchdog);
    return run.result(end);
  }
}

/** Renders a design's firmware for the interpreter. */
export async function micropythonEngine(
  sheet: SheetIdentity,
  design: FirmwareDesign,
): Promise<MicroPythonEngine> {
  const files = await renderFirmware(sheet, design);
  const inFolder = files.map(({ path, text }) => ({ path: path.slice(path.indexOf('/') + 1), text }));
  return new MicroPythonEngine(inFolder, design.vehicle);
}
