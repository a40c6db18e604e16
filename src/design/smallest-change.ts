/**
 * For a sheet that no design meets: the smallest change of one quantity at a time that lets a design exist.
 *
 * Each quantity is moved in steps of growing size the way that can help, until the sheet passes its check and every class has a
 * law; then the step is halved in again, and the value is rounded to what a person can set, away from the old one. A change is
 * proposed only after the rounded sheet passed as a whole. Changes are ordered by relative size.
 */
import { checkSheet } from '../sheet/check.js';
import type { ResolvedSheet } from '../sheet/defaults.js';
import type { SheetChange } from '../sheet/problem.js';
import { toVehicle } from '../sheet/to-vehicle.js';
import { pointerTo } from '../sheet/words.js';
import { hasLaws } from './class-base.js';

interface Quantity {
  pointer: string;
  unit: string;
  /** The finest that a person can set, in the field's unit. */
  step: number;
  ways: readonly ('up' | 'down')[];
  get: (sheet: ResolvedSheet) => number | undefined;
  set: (sheet: ResolvedSheet, value: number) => void;
}

const QUANTITIES: readonly Quantity[] = [
  {
    pointer: '/line/tightestRadiusMm',
    unit: 'mm',
    step: 5,
    ways: ['up'],
    get: ({ line }) => line.tightestRadiusMm,
    set: ({ line }, value) => (line.tightestRadiusMm = value),
  },
  {
    pointer: '/sensors/aheadOfAxleMm',
    unit: 'mm',
    step: 1,
    ways: ['up', 'down'],
    get: ({ sensors }) => sensors.aheadOfAxleMm,
    set: ({ sensors }, value) => (sensors.aheadOfAxleMm = value),
  },
  {
    pointer: '/sensors/pitchMm',
    unit: 'mm',
    step: 0.5,
    ways: ['up', 'down'],
    get: ({ sensors }) => sensors.pitchMm,
    set: ({ sensors }, value) => (sensors.pitchMm = value),
  },
  {
    pointer: '/drive/trackWidthMm',
    unit: 'mm',
    step: 1,
    ways: ['down'],
    get: ({ drive }) => drive.trackWidthMm,
    set: ({ drive }, value) => (drive.trackWidthMm = value),
  },
  {
    pointer: '/drive/motor/timeConstantMs',
    unit: 'ms',
    step: 5,
    ways: ['down'],
    get: ({ drive }) => drive.motor.timeConstantMs,
    set: ({ drive }, value) => (drive.motor.timeConstantMs = value),
  },
  {
    pointer: '/drive/motor/noLoadRpm',
    unit: 'rpm',
    step: 10,
    ways: ['up', 'down'],
    get: ({ drive }) => drive.motor.noLoadRpm,
    set: ({ drive }, value) => (drive.motor.noLoadRpm = value),
  },
  {
    pointer: '/drive/gripCoefficient',
    unit: '',
    step: 0.05,
    ways: ['up'],
    get: ({ drive }) => drive.gripCoefficient,
    set: ({ drive }, value) => (drive.gripCoefficient = value),
  },
  {
    pointer: '/tolerances/timeConstantPercent',
    unit: '%',
    step: 1,
    ways: ['down'],
    get: ({ tolerances }) => tolerances.timeConstantPercent,
    set: ({ tolerances }, value) => (tolerances.timeConstantPercent = value),
  },
  {
    pointer: '/tolerances/motorGainPercent',
    unit: '%',
    step: 1,
    ways: ['down'],
    get: ({ tolerances }) => tolerances.motorGainPercent,
    set: ({ tolerances }, value) => (tolerances.motorGainPercent = value),
  },
];

/** Speeds that the sheet gives: of each class alone, and of all together, none faster than a cap. */
function givenSpeeds({ speeds }: ResolvedSheet): Quantity[] {
  if (speeds.classes === 'auto') return [];
  const classesOf = (sheet: ResolvedSheet) => sheet.speeds.classes as { speedMps: number }[];
  const slower = { unit: 'm/s', step: 0.01, ways: ['down'] } as const;
  const each = speeds.classes.map((_, i): Quantity => ({
    ...slower,
    pointer: pointerTo('speeds', 'classes', i, 'speedMps'),
    get: (sheet) => classesOf(sheet)[i]!.speedMps,
    set: (sheet, value) => (classesOf(sheet)[i]!.speedMps = value),
  }));
  const cap: Quantity = {
    ...slower,
    pointer: '/speeds/classes',
    get: (sheet) => Math.max(...classesOf(sheet).map((one) => one.speedMps)),
    set: (sheet, value) => {
      for (const one of classesOf(sheet)) one.speedMps = Math.min(one.speedMps, value);
    },
  };
  return each.length > 1 ? [...each, cap] : each;
}

/** Factors by which a quantity is moved, until one helps. */
const FACTORS = [1.05, 1.12, 1.2, 1.3, 1.45, 1.65, 1.9, 2.2, 2.6, 3.2, 4];
/** Halvings of the factor that helped. */
const HALVINGS = 4;

function withValue(sheet: ResolvedSheet, { set }: Quantity, value: number): ResolvedSheet {
  const changed = structuredClone(sheet);
  set(changed, value);
  return changed;
}

/** Whether a sheet passes its check and every class of it has a law. */
function isFeasible(sheet: ResolvedSheet): boolean {
  const checked = checkSheet(sheet);
  return checked.sheet !== undefined && hasLaws(toVehicle(checked.sheet));
}

/** The multiple of the step next to a value, away from where it came from. */
function roundedAway(value: number, step: number, way: 'up' | 'down'): number {
  const steps = value / step;
  const whole = way === 'up' ? Math.ceil(steps - 1e-9) : Math.floor(steps + 1e-9);
  return Number((whole * step).toPrecision(12));
}

function changeOf(sheet: ResolvedSheet, quantity: Quantity, way: 'up' | 'down'): SheetChange | undefined {
  const from = quantity.get(sheet);
  if (from === undefined || from <= 0) return undefined;
  const valueAt = (factor: number): number =>
    roundedAway(way === 'up' ? from * factor : from / factor, quantity.step, way);
  const helps = (factor: number): boolean => isFeasible(withValue(sheet, quantity, valueAt(factor)));
  const index = FACTORS.findIndex(helps);
  if (index < 0) return undefined;
  let enough = FACTORS[index] as number;
  let tooLittle = FACTORS[index - 1] ?? 1;
  for (let i = 0; i < HALVINGS; i++) {
    const middle = Math.sqrt(enough * tooLittle);
    if (helps(middle)) enough = middle;
    else tooLittle = middle;
  }
  return { pointer: quantity.pointer, from, to: valueAt(enough), unit: quantity.unit };
}

/** How large a change is, as the size of a ratio's logarithm; a value that becomes 0 counts as the largest. */
function sizeOf({ from, to }: SheetChange): number {
  return to > 0 ? Math.abs(Math.log(to / from)) : Infinity;
}

/** Every change of one quantity alone that makes a sheet feasible, the relatively smallest first. */
export function smallestChanges(sheet: ResolvedSheet): SheetChange[] {
  const found = [...givenSpeeds(sheet), ...QUANTITIES].flatMap((quantity) =>
    quantity.ways.flatMap((way) => changeOf(sheet, quantity, way) ?? []),
  );
  return found.toSorted((a, b) => sizeOf(a) - sizeOf(b));
}

const MOST_TOLD = 3;

function changeText({ pointer, from, to, unit }: SheetChange): string {
  const what =
    pointer === '/speeds/classes' ? 'no speed in /speeds/classes above' : `${pointer} from ${from} to`;
  return `${what} ${to}${unit && ` ${unit}`}`;
}

/** The advice for a sheet that no design meets, and the changes behind it. */
export function advice(sheet: ResolvedSheet): { fix: string; changes: SheetChange[] } {
  const changes = smallestChanges(sheet).slice(0, MOST_TOLD);
  const fix =
    changes.length === 0
      ? 'No change of one quantity alone gives a design: move the bar further ahead, make it wider, take motors with a smaller time constant, and lower the speeds together.'
      : `Smallest changes that give a design, each alone: ${changes.map(changeText).join('; ')}.`;
  return { fix, changes };
}
