/** The sheets and the course of the demo. */
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';

const FOLDER = fileURLToPath(new URL('../../examples/tray-cart', import.meta.url));

/** One cart, as an Arduino and as a MicroPython vehicle. */
export const SHEETS = ['tray-cart.json', 'tray-cart-esp32.json'].map((name) => join(FOLDER, name));
export const COURSE = join(FOLDER, 'nursery-lane.json');
