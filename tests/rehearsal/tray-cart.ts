/** The demo's vehicle. */
import { readFileSync } from 'node:fs';
import { checkSheet } from '../../src/sheet/check.js';
import { toVehicle } from '../../src/sheet/to-vehicle.js';
import type { Vehicle } from '../../src/vehicle/vehicle.js';

export function trayCart(): Vehicle {
  const data: unknown = JSON.parse(readFileSync('examples/tray-cart/tray-cart.json', 'utf8'));
  const { sheet, problems } = checkSheet(data);
  if (sheet === undefined) throw new Error(JSON.stringify(problems));
  return toVehicle(sheet);
}
