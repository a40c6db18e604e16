/** Folder of the Arduino core for AVR boards, as its package installs it. */
export const ARDUINO_CORE: string;
/** Names of the system packages for the rehearsal on the chip that this machine lacks. */
export function missingTools(): string[];
/** Names of the system packages for the tests that this machine lacks, those for the chip among them. */
export function missingForTests(): string[];
/** One sentence that says what is missing and what to type. */
export function howToInstall(missing: readonly string[]): string;
