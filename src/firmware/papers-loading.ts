/**
 * How the firmware gets onto the board: commands, and what to know.
 *
 * arduino-cli: documentation of its sketch project file (a profile names the board and the core's version). mpremote: MicroPython's
 * documentation of it.
 */
import type { Vehicle } from '../vehicle/vehicle.js';
import { fileName } from './identifiers.js';
import type { RenderedFile } from './render.js';

/** A released version of the Arduino AVR core (from memory); the one that the tests compile with is Debian's, a step newer. */
const CORE_VERSION = '1.8.6';

/** Longest command line. */
const COMMAND_WIDTH = 76;

interface LoadingView {
  before: string;
  commands: readonly string[];
  notes: readonly string[];
  fqbn: string;
  profile: string;
  coreVersion: string;
}

/** Command lines that copy files to the board, in this order, each short enough to be pasted. */
export function copyCommands(files: readonly string[]): string[] {
  const commands: string[] = [];
  let names = '';
  for (const file of files) {
    if (names.length + file.length > COMMAND_WIDTH) {
      commands.push(`mpremote cp${names} :`);
      names = '';
    }
    names += ` ${file}`;
  }
  return [...commands, `mpremote cp${names} :`];
}

function arduino({ name }: Vehicle): Pick<LoadingView, 'before' | 'commands' | 'notes'> {
  const folder = fileName(name);
  return {
    before: `Open ${folder}.ino in the Arduino IDE, choose the board and its port, and upload. Or from a command line in the folder above this one, with arduino-cli, which finds board and core in sketch.yaml:`,
    commands: [
      `arduino-cli board list`,
      `arduino-cli compile ${folder}`,
      `arduino-cli upload -p PORT ${folder}`,
    ],
    notes: ['PORT is the name that the first command shows for the board.'],
  };
}

function micropython(firmware: readonly RenderedFile[]): Pick<LoadingView, 'before' | 'commands' | 'notes'> {
  const names = firmware.map(({ path }) => path.slice(path.indexOf('/') + 1));
  // main.py comes last: if the copying is interrupted, the board has no program that lacks half its modules.
  const [main, ...modules] = names;
  return {
    before: 'From a command line in this folder (pip install mpremote):',
    commands: ['mpremote connect list', ...copyCommands([...modules, main!]), 'mpremote reset'],
    notes: [
      'With several boards on the computer, write "mpremote connect PORT" for "mpremote", with a name that the first command shows.',
      'boot.py stays as it is. The first run starts the watchdog, which nothing stops: from then on the board restarts by itself when the program is interrupted; switch it off and on before changing files.',
    ],
  };
}

export function loadingView(vehicle: Vehicle, firmware: readonly RenderedFile[]): LoadingView {
  const { board, language } = vehicle;
  const { before, commands, notes } = language === 'arduino' ? arduino(vehicle) : micropython(firmware);
  return {
    before,
    commands,
    notes: [
      ...notes,
      ...board.flashing,
      'First run: wheels off the floor. Check that both turn forward, and that the button stops them.',
    ],
    fqbn: board.core?.fqbn ?? '',
    profile: board.id,
    coreVersion: CORE_VERSION,
  };
}
