/** `fairlead rehearse SHEET --spreads`: what differs from one drawn vehicle to the next. */
import { spreadRows, spreadsText } from '../report/spreads-text.js';
import { loadSheet } from '../sheet/load.js';
import { toVehicle } from '../sheet/to-vehicle.js';
import type { Io } from './io.js';

export async function spreadsCommand(path: string, wantsJson: boolean, io: Io): Promise<void> {
  const vehicle = toVehicle((await loadSheet(path)).sheet);
  if (wantsJson) io.json({ spreads: spreadRows(vehicle) });
  else io.stdout(spreadsText(vehicle));
}
