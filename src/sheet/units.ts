/**
 * The one place where units are converted: human units at the edges, SI inside.
 *
 * Exact by definition: 1 in = 25.4 mm, 1 lb = 0.45359237 kg (international yard and pound agreement, 1959).
 */
import { joinOr, quote } from './words.js';

export const mmToM = (mm: number): number => mm / 1000;
export const mToMm = (m: number): number => m * 1000;
export const msToS = (ms: number): number => ms / 1000;
export const sToMs = (s: number): number => s * 1000;
export const percentToFraction = (percent: number): number => percent / 100;
export const fractionToPercent = (fraction: number): number => fraction * 100;
export const khzToHz = (khz: number): number => khz * 1000;
export const hzToKhz = (hz: number): number => hz / 1000;
export const degToRad = (deg: number): number => (deg * Math.PI) / 180;
export const radToDeg = (rad: number): number => (rad * 180) / Math.PI;
export const rpmToRadPerS = (rpm: number): number => (rpm * 2 * Math.PI) / 60;
export const radPerSToRpm = (radPerS: number): number => (radPerS * 60) / (2 * Math.PI);

/** How many of the sheet's unit one of each accepted unit makes; the names shown in messages come first. */
const FACTORS = {
  mm: { mm: 1, cm: 10, m: 1000, in: 25.4, ft: 304.8, inch: 25.4, inches: 25.4, '"': 25.4, '″': 25.4 },
  s: { s: 1, ms: 0.001, min: 60, sec: 1, seconds: 1 },
  ms: { ms: 1, s: 1000, sec: 1000 },
  V: { V: 1, mV: 0.001, volt: 1, volts: 1 },
  A: { A: 1, mA: 0.001 },
  kg: { kg: 1, g: 0.001, lb: 0.45359237, oz: 0.45359237 / 16 },
  rpm: { rpm: 1, '1/min': 1, rps: 60, 'rad/s': 60 / (2 * Math.PI), 'r/min': 1 },
  'm/s': { 'm/s': 1, 'mm/s': 0.001, 'cm/s': 0.01, 'km/h': 1 / 3.6, 'in/s': 0.0254 },
  '%': { '%': 1, percent: 1 },
  deg: { deg: 1, rad: 180 / Math.PI, '°': 1, degrees: 1 },
  kHz: { kHz: 1, Hz: 0.001 },
  counts: { counts: 1, count: 1 },
  '1/m^2': { '1/m^2': 1, '1/m2': 1 },
  '1': {},
} as const satisfies Record<string, Readonly<Record<string, number>>>;

/** A unit of the sheet; "1" is a bare number. */
export type Unit = keyof typeof FACTORS;

export function isUnit(text: unknown): text is Unit {
  return typeof text === 'string' && Object.hasOwn(FACTORS, text);
}

/** A number in the sheet's unit, or one sentence on what is wrong with the text. */
export type Quantity = { ok: true; value: number } | { ok: false; message: string };

const EXAMPLES: Readonly<Record<Unit, string>> = {
  '1/m^2': '300',
  mm: '65, 65 mm, 6.5 cm or 2.5 in',
  s: '2, 2 s or 500 ms',
  ms: '80, 80 ms or 0.08 s',
  V: '6 or 6 V',
  A: '1.2, 1.2 A or 1200 mA',
  kg: '0.6, 0.6 kg or 600 g',
  rpm: '680 or 680 rpm',
  'm/s': '0.5, 0.5 m/s or 50 cm/s',
  '%': '10 or 10 %',
  deg: '30 or 30 deg',
  kHz: '20, 20 kHz or 20000 Hz',
  counts: '500',
  '1': '0.7',
};

const DECIMAL = /^([+-]?(?:\d+(?:[.,]\d*)?|[.,]\d+)(?:[eE][+-]?\d+)?)\s*(.*)$/s;
const FRACTION = /^(?:(\d+)[ -]\s*)?(\d+)\/(\d+)\s*(\D.*|)$/s;

/**
 * Reads a quantity as a person types it: "65", "6.5 cm", "6,5cm", '2 1/2"'. A bare number is in `unit`.
 *
 * Decimal comma or point; a comma before exactly three digits could be either a decimal or a thousands mark and is refused.
 * Limits are not checked here.
 */
export function parseQuantity(text: string, unit: Unit): Quantity {
  const trimmed = text.trim();
  const fraction = FRACTION.exec(trimmed);
  if (fraction) {
    const [, whole, above, below, rest] = fraction;
    return scaled(Number(whole ?? 0) + Number(above) / Number(below), rest ?? '', text, unit);
  }
  const decimal = DECIMAL.exec(trimmed);
  if (!decimal) return nonsense(text, unit);
  const [, number = '', rest = ''] = decimal;
  if (/^[+-]?[1-9]\d{0,2},\d{3}$/.test(number)) {
    const [before = '', after = ''] = number.split(',');
    const message = `${quote(text)} can be read as ${before}.${after} or as ${before}${after}; write one of these.`;
    return { ok: false, message };
  }
  return scaled(Number(number.replace(',', '.')), rest, text, unit);
}

/** A length in millimetres from text with or without a unit: "6.5 cm" is 65. */
export function parseLength(text: string): Quantity {
  return parseQuantity(text, 'mm');
}

function scaled(number: number, unitText: string, text: string, unit: Unit): Quantity {
  const names = Object.entries<number>(FACTORS[unit]);
  const written = unitText.trim().toLowerCase();
  const factor = written === '' ? 1 : names.find(([name]) => name.toLowerCase() === written)?.[1];
  if (factor === undefined) {
    if (names.length === 0) return nonsense(text, unit);
    const allowed = joinOr(names.slice(0, 5).map(([name]) => name));
    return {
      ok: false,
      message: `${quote(text)}: the unit ${quote(unitText.trim())} does not fit here; use ${allowed}.`,
    };
  }
  if (!Number.isFinite(number * factor)) return nonsense(text, unit);
  // Twelve digits take away the last bit that the factor adds: 1.1 in is 27.94 mm, not 27.939999999999998.
  return { ok: true, value: Number((number * factor).toPrecision(12)) };
}

function nonsense(text: string, unit: Unit): Quantity {
  const of = unit === '1' ? 'a number' : unit === '%' ? 'a percentage' : `a number of ${unit}`;
  const found = text.trim() === '' ? 'Nothing was given' : `${quote(text)} is not ${of}`;
  return { ok: false, message: `${found}; write for example ${EXAMPLES[unit]}.` };
}
