/** Runs a program's files in the MicroPython interpreter on a virtual chip, from power-on to its end. */
import type { BoardFacts } from '../vehicle/board-facts.js';
import { MicroPythonChip, type Surroundings } from './micropython-chip.js';
import { ChipReset } from './micropython-clock.js';
import { PythonFailure, type PythonFile, withInterpreter } from './micropython-interpreter.js';
import { boardModules } from './micropython-modules.js';

/** Thrown by the surroundings to switch the chip off; the program is not asked. */
export class PowerCut extends Error {
  override readonly name = 'PowerCut';
}

export interface ProgramEnd {
  /** power-cut: by the surroundings; returned: main.py came to its end; reset: by the watchdog or on request. */
  by: 'power-cut' | 'returned' | 'exception' | 'reset';
  /** The traceback, or why the chip was reset; "" otherwise. */
  detail: string;
  /** Lines printed, at most 1000. */
  output: readonly string[];
}

const MODULES = '/board';
const PROGRAM = '/program';

/** As the board does after power-on: our modules are built in, main.py runs as a script in the folder of its files. */
const BOOT = `
import sys, os
sys.path.insert(0, "${MODULES}")
import machine, time
sys.modules["utime"] = time
sys.path.pop(0)
os.chdir("${PROGRAM}")
with open("main.py") as file:
    source = file.read()
exec(compile(source, "main.py", "exec"), {"__name__": "__main__"})
`;

function endOf(error: unknown): Pick<ProgramEnd, 'by' | 'detail'> {
  if (error instanceof PowerCut) return { by: 'power-cut', detail: '' };
  if (error instanceof ChipReset) return { by: 'reset', detail: error.message };
  if (error instanceof PythonFailure && error.type === 'SystemExit') return { by: 'returned', detail: '' };
  if (error instanceof PythonFailure) return { by: 'exception', detail: error.traceback };
  throw error;
}

/**
 * Runs main.py.
 *
 * @param files the program, main.py among them
 * @param resetCause what `machine.reset_cause()` tells, see RESET_CAUSE
 * @returns how it ended; a program that neither sleeps nor reads anything would run for ever
 */
export function runProgram(
  files: readonly PythonFile[],
  board: BoardFacts,
  surroundings: Surroundings,
  resetCause?: number,
): Promise<ProgramEnd> {
  return withInterpreter((interpreter) => {
    const chip = new MicroPythonChip(board, surroundings, resetCause);
    interpreter.registerModule('_chip', chip.functions());
    interpreter.writeFiles(MODULES, boardModules(board));
    interpreter.writeFiles(PROGRAM, files);
    let end: Pick<ProgramEnd, 'by' | 'detail'> = { by: 'returned', detail: '' };
    try {
      interpreter.run(BOOT);
    } catch (error) {
      end = endOf(error);
    }
    return { ...end, output: interpreter.output };
  });
}
