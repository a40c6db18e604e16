/** Designs to draw, each computed once, and pictures read back: what stands where. */
import { DOMParser, type Element } from '@xmldom/xmldom';
import type { Design } from '../../../src/design/design.js';
import { deriveDesign } from '../../../src/design/derive.js';
import type { Vehicle } from '../../../src/vehicle/vehicle.js';
import { demoVehicle, demoVehicleOnBend } from '../../design/demo-vehicle.js';

/** The demo cart with so many sensors in a row. */
function withSensors(count: number, pitchM: number): Vehicle {
  const vehicle = demoVehicle('rules');
  const positionsM = Array.from({ length: count }, (_, i) => ((count - 1) / 2 - i) * pitchM);
  const pins = Array.from({ length: count }, () => vehicle.bar.pins[0]!);
  const readings = (counts: number) => Array.from({ length: count }, () => counts);
  const calibration = { mode: 'stored' as const, ground: readings(123), line: readings(839) };
  return { ...vehicle, bar: { ...vehicle.bar, positionsM, pins, calibration } };
}

/** A big slow cart: four times the lengths, a fifth of the time. */
function bigCart(): Vehicle {
  const { bar, drive, ...rest } = demoVehicleOnBend(0.8);
  const classes = [
    { name: 'wide', minRadiusM: 4, speedMps: 0.5 },
    { name: 'tight', minRadiusM: 0.8, speedMps: 0.4 },
  ];
  return {
    ...rest,
    speeds: { ...rest.speeds, classes },
    line: { ...rest.line, widthM: 0.04 },
    bar: { ...bar, positionsM: bar.positionsM.map((at) => 1.5 * at), aheadM: 0.22, spotRadiusM: 0.006 },
    drive: { ...drive, trackM: 0.42, topSpeedMps: 0.59, lagS: 0.22 },
  };
}

function withClasses(classes: Exclude<Vehicle['speeds']['classes'], 'auto'>): Vehicle {
  const vehicle = demoVehicle();
  return { ...vehicle, speeds: { ...vehicle.speeds, classes } };
}

const CARTS = {
  pid: () => demoVehicle(),
  rules: () => demoVehicle('rules'),
  'two sensors': () => withSensors(2, 0.018),
  'eight sensors': () => withSensors(8, 0.0095),
  big: bigCart,
  'classes by hand': () =>
    withClasses([
      { name: 'a long name of 24 letters', minRadiusM: 2, speedMps: 1.1 },
      { name: 'mid', minRadiusM: 0.4, speedMps: 0.8 },
      { name: 'bend', minRadiusM: 0.12, speedMps: 0.5 },
    ]),
  'unstable gains': () => ({
    ...withClasses([{ name: 'all', minRadiusM: 0.12, speedMps: 0.9 }]),
    control: {
      ...demoVehicle().control,
      gains: { proportionalPerM2: 3000, derivativeTimeS: 0, filterTimeS: 0.004 },
    },
  }),
  'too fast': () => withClasses([{ name: 'all', minRadiusM: 0.12, speedMps: 1.49 }]),
} satisfies Record<string, () => Vehicle>;

export type CartName = keyof typeof CARTS;
export const CART_NAMES = Object.keys(CARTS) as CartName[];

const designs = new Map<CartName, Design>();

export function designOf(name: CartName): Design {
  const known = designs.get(name);
  if (known) return known;
  const design = deriveDesign(CARTS[name]());
  designs.set(name, design);
  return design;
}

/** The root of a picture; throws where it is not well-formed XML. */
export function parsed(svg: string): Element {
  const parser = new DOMParser({
    onError: (level, message) => {
      throw new Error(`${level}: ${message}`);
    },
  });
  const root = parser.parseFromString(svg, 'image/svg+xml').documentElement;
  if (root === null) throw new Error('There is no element.');
  return root;
}

/** Elements below one, in document order. */
export function elementsOf(root: Element, name = '*'): Element[] {
  return Array.from(root.getElementsByTagName(name));
}

/** Elements whose class attribute has a word. */
export function classed(root: Element, word: string): Element[] {
  return elementsOf(root).filter((each) => (each.getAttribute('class') ?? '').split(' ').includes(word));
}

export function numberOf(element: Element, attribute: string): number {
  const text = element.getAttribute(attribute);
  if (text === null) throw new Error(`There is no ${attribute}.`);
  return Number(text);
}

/** Corner points of a path of the commands M, L, H, V, h, v and Z. */
export function pointsOf(path: Element): [x: number, y: number][] {
  const points: [number, number][] = [];
  let [x, y] = [0, 0];
  for (const [, command, rest] of (path.getAttribute('d') ?? '').matchAll(/([MLHVhvZ])([^MLHVhvZ]*)/g)) {
    const numbers = (rest!.match(/-?[\d.]+/g) ?? []).map(Number);
    if (command === 'M' || command === 'L') [x, y] = numbers as [number, number];
    else if (command === 'H') x = numbers[0]!;
    else if (command === 'V') y = numbers[0]!;
    else if (command === 'h') x += numbers[0]!;
    else if (command === 'v') y += numbers[0]!;
    else continue;
    points.push([x, y]);
  }
  return points;
}

/** From a place in px back to the value, by the numbers beside an axis. */
export function valueAt(
  plot: Element,
  axis: 'x' | 'y',
  scale: (value: number) => number = (value) => value,
): (px: number) => number {
  const ticks = classed(plot, `${axis}-number`).map((text) => ({
    // numbers of the y axis stand 4.5 px below their lines
    px: numberOf(text, axis) - (axis === 'y' ? 4.5 : 0),
    value: scale(Number((text.textContent ?? '').replace('\u2212', '-'))),
  }));
  const [first, last] = [ticks[0]!, ticks[ticks.length - 1]!];
  const perPx = (last.value - first.value) / (last.px - first.px);
  return (px) => first.value + (px - first.px) * perPx;
}
