// The system packages that compile the generated sketches (for the emulated chip) and the control law (for the host),
// and what else the tests run: a real terminal, and a general reference library to compare with.
// One list for set-up, CI and the rehearsal on the chip; plain JavaScript, because set-up runs before the build.
import { existsSync } from 'node:fs';
import { delimiter, join } from 'node:path';

export const ARDUINO_CORE = '/usr/share/arduino/hardware/arduino/avr';

/** Debian's names, each with the command or file that proves it installed. */
const TOOLS = [
  { name: 'gcc-avr', command: 'avr-gcc' },
  { name: 'avr-libc', file: '/usr/lib/avr/include/avr/io.h' },
  { name: 'arduino-core-avr', file: `${ARDUINO_CORE}/cores/arduino/Arduino.h` },
  { name: 'g++', command: 'g++' },
];

/** What only the tests need. */
const TEST_TOOLS = [
  { name: 'cppcheck', command: 'cppcheck' },
  { name: 'tmux', command: 'tmux' },
  { name: 'libsimavr-dev', file: '/usr/include/simavr/sim_avr.h' },
  { name: 'parallel', command: 'parallel' },
  { name: 'python3-scipy', file: '/usr/lib/python3/dist-packages/scipy/__init__.py' },
];

/** Names of the packages for the rehearsal on the chip that this machine lacks. */
export function missingTools() {
  return lacking(TOOLS);
}

/** Names of the packages for the tests that this machine lacks, those for the chip among them. */
export function missingForTests() {
  return lacking([...TOOLS, ...TEST_TOOLS]);
}

function lacking(tools) {
  const folders = (process.env.PATH ?? '').split(delimiter);
  const isThere = ({ command, file }) =>
    command ? folders.some((folder) => existsSync(join(folder, command))) : existsSync(file);
  return tools.filter((tool) => !isThere(tool)).map(({ name }) => name);
}

/** One sentence that says what is missing and what to type. */
export function howToInstall(missing) {
  const names = missing.join(' ');
  return (
    `missing: ${missing.join(', ')}. On Debian or Ubuntu, type: ` +
    `sudo apt-get update && sudo apt-get install ${names}`
  );
}
