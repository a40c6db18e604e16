/** The demo cart as an SI vehicle, with changes for a test. */
import { readFileSync } from 'node:fs';
import { checkSheet } from '../../src/sheet/check.js';
import { toVehicle } from '../../src/sheet/to-vehicle.js';
import type { Vehicle } from '../../src/vehicle/vehicle.js';

const file = new URL('../../examples/tray-cart/tray-cart.json', import.meta.url);

/** @param kind controller kind */
export function demoVehicle(kind: 'pid' | 'rules' = 'pid'): Vehicle {
  const data = JSON.parse(readFileSync(file, 'utf8')) as { control: { kind: string } };
  data.control.kind = kind;
  const { sheet, problems } = checkSheet(data);
  if (sheet === undefined) throw new Error(JSON.stringify(problems));
  return toVehicle(sheet);
}

/** The demo cart with another tightest bend, m. */
export function demoVehicleOnBend(tightestRadiusM: number, kind: 'pid' | 'rules' = 'pid'): Vehicle {
  const vehicle = demoVehicle(kind);
  return { ...vehicle, line: { ...vehicle.line, tightestRadiusM } };
}
