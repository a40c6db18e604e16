/** What differs from one drawn vehicle to the next, as a table: each figure, its range and where that comes from. */
import { READING_NOISE, spreads } from '../rehearsal/plant-table.js';
import type { Vehicle } from '../vehicle/vehicle.js';
import { table } from './text-table.js';

/** One row of the table; numbers in the unit named, factors on the sheet's figure where `isFactor`. */
export interface SpreadRow {
  title: string;
  unit: string;
  isFactor: boolean;
  low: number;
  high: number;
  source: string;
}

export function spreadRows(vehicle: Vehicle): SpreadRow[] {
  const rows = spreads(vehicle).map(({ title, unit, by, low, high, source }) => {
    return { title, unit, isFactor: by === 'factor', low, high, source };
  });
  const title = 'noise of a reading, standard deviation, of full scale';
  const noise = { low: READING_NOISE, high: READING_NOISE, source: 'common practice' };
  return [...rows, { title, unit: '1', isFactor: false, ...noise }];
}

export function spreadsText(vehicle: Vehicle): string {
  const rows = spreadRows(vehicle).map(({ title, unit, isFactor, low, high, source }) => [
    title,
    String(Number(low.toPrecision(3))),
    String(Number(high.toPrecision(3))),
    isFactor ? 'times the sheet' : unit === '1' ? '' : unit,
    source,
  ]);
  return `${table([['figure', 'from', 'to', 'unit', 'source'], ...rows])}\nEach is drawn evenly from its range, by the seed alone; seed 0 is the vehicle just as in the sheet.\n`;
}
