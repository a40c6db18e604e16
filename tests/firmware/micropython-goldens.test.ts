/** The golden MicroPython programs, as they are on disk, run on the stand. */
import { fileURLToPath } from 'node:url';
import { describe, expect, it } from 'vitest';
import { toVehicle } from '../../src/sheet/to-vehicle.js';
import { loadSheet } from '../../src/sheet/load.js';
import { goldenFiles } from './golden-cases.js';
import { drivenFromS, filesOnStand, offFromS } from './micropython-stand.js';

describe.each(['esp32-pid-stored', 'pico-rules-digital'])('golden %s', (name) => {
  it('starts, drives and stops at the press of the button', async () => {
    const path = fileURLToPath(new URL(`../goldens/${name}/sheet.json`, import.meta.url));
    const vehicle = toVehicle((await loadSheet(path)).sheet);
    const files = Object.entries(goldenFiles(name)).map(([file, text]) => ({
      path: file.slice(file.indexOf('/') + 1),
      text,
    }));
    const pressed = [
      [1, 1.2],
      [3, 3.2],
    ] as const;
    const seen = await filesOnStand(vehicle, files, { pressed, endS: 5 });
    expect(seen.end).toEqual({ by: 'power-cut', detail: '', output: [] });
    expect(drivenFromS(seen)).toBeGreaterThan(1 + vehicle.start.countdownS);
    expect(offFromS(seen)).toBeGreaterThan(3);
  });
});
