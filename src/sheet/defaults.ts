/**
 * Fills in what a sheet leaves out. The values come from the schema and stand nowhere else.
 *
 * For a field that has to be given, the schema's `default` is only what the questionnaire proposes; for one that may be
 * left out it is what then holds. An object left out whole is filled from its own default and then field by field.
 */
import { SCHEMAS, resolved, type SchemaNode } from './schema.js';
import type { MotorPins, Sheet } from './sheet-types.js';
import { degToRad } from './units.js';

type Filled<T, Given extends keyof T = never> = Required<Omit<T, Given>> & Pick<T, Given>;
type Motor = Filled<MotorPins, 'pwm' | 'dir' | 'in1' | 'in2'>;
type Gains = NonNullable<Sheet['control']['gains']>;
type Drive = Sheet['drive'];
type GivenClass = Exclude<Sheet['speeds']['classes'], 'auto'>[number];
/** A speed class with its radius, whichever way its bends are given. */
export type SpeedClass = GivenClass & { minRadiusMm: number };

/** A sheet with every default filled in. What has none stays optional. */
export interface ResolvedSheet extends Required<Omit<Sheet, 'encoders' | 'led' | 'stopPin'>> {
  encoders?: Sheet['encoders'] & {};
  led?: Required<NonNullable<Sheet['led']>>;
  stopPin?: number | string;
  line: Required<Sheet['line']>;
  sensors: Filled<Sheet['sensors'], 'pitchMm' | 'positionsMm' | 'kinds'>;
  drive: Omit<Required<Drive>, 'motor' | 'driver' | 'trim'> & {
    motor: Required<Drive['motor']>;
    driver: Omit<Drive['driver'], 'left' | 'right' | 'maxPwmKhz'> & {
      left: Motor;
      right: Motor;
      maxPwmKhz: number;
    };
    trim: Required<NonNullable<Drive['trim']>>;
  };
  control: Sheet['control'] & { stateMemory: boolean; swingMm: number } & {
    gains?: Filled<Gains, 'integralDistanceMm'>;
  };
  speeds: Omit<Required<Sheet['speeds']>, 'classes'> & { classes: 'auto' | SpeedClass[] };
  start: Required<Sheet['start']>;
  tolerances: Required<NonNullable<Sheet['tolerances']>>;
}

/**
 * Fields whose default is a proposal only. The pitch is one of two ways to say where the sensors are: the other may be given, and a
 * spacing is to be measured, not assumed. Gains by hand integrate only where they say so.
 */
const NEVER_FILLED = ['pitchMm', 'integralDistanceMm'];

/** A copy of the sheet with every default filled in. `sheet` has to fit the schema. */
export function withDefaults(sheet: Sheet): ResolvedSheet {
  const whole = filled(SCHEMAS.sheet, SCHEMAS.sheet, sheet) as ResolvedSheet;
  const classes = sheet.speeds.classes;
  if (classes !== 'auto') {
    // a class without either is told by the rule class-bends; until then it counts as one for the tightest bend
    const usual = sheet.line.tightestRadiusMm;
    whole.speeds.classes = classes.map((each) => ({ ...each, minRadiusMm: classRadiusMm(each) ?? usual }));
  }
  return whole;
}

/** Smallest radius of a class: as given, or length / angle of its sharpest bend. */
function classRadiusMm({ minRadiusMm, sharpness }: GivenClass): number | undefined {
  return minRadiusMm ?? (sharpness && sharpness.withinMm / degToRad(sharpness.turnDeg));
}

function filled(root: SchemaNode, node: SchemaNode, value: unknown): unknown {
  const { properties } = resolved(root, node);
  if (typeof value !== 'object' || value === null) return value;
  if (!properties) return structuredClone(value);
  const given = value as Readonly<Record<string, unknown>>;
  const entries = Object.entries(properties).flatMap(([key, child]): [string, unknown][] => {
    const field = resolved(root, child);
    const proposal = NEVER_FILLED.includes(key) ? undefined : field.default;
    const found = Object.hasOwn(given, key) ? given[key] : proposal;
    return found === undefined ? [] : [[key, filled(root, field, found)]];
  });
  return Object.fromEntries(entries);
}
