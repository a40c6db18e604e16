/**
 * The static assertions of constants.h repeat the interval analysis: for every number of a controller, made larger step by step, the
 * header does not compile any more at the latest where the analysis speaks of an overflow.
 */
import { spawnSync } from 'node:child_process';
import { expect, it } from 'vitest';
import type { ControllerConstants } from '../../src/controller/constants.js';
import { overflows } from '../../src/design/intervals.js';
import { LiteralError } from '../../src/firmware/literals.js';
import { type FirmwareDesign, renderFirmware } from '../../src/firmware/render.js';
import { CARTS, SHEET, cart, quickDesign } from './cart.js';

const FACTORS = [2, 4, 16, 256];
const FLAGS = ['-std=gnu++11', '-mmcu=atmega328p', '-fsyntax-only', '-x', 'c++', '-'];

/** Ways to the numbers of a controller. */
function paths(value: unknown, way: readonly (string | number)[] = []): (readonly (string | number)[])[] {
  if (typeof value === 'number') return [way];
  if (value === null || typeof value !== 'object') return [];
  return Object.entries(value).flatMap(([key, inner]) =>
    paths(inner, [...way, Array.isArray(value) ? Number(key) : key]),
  );
}

/** A copy with one number multiplied. */
function scaled(
  controller: ControllerConstants,
  way: readonly (string | number)[],
  factor: number,
): ControllerConstants {
  const copy = structuredClone(controller);
  let place = copy as unknown as Record<string | number, unknown>;
  for (const key of way.slice(0, -1)) place = place[key] as Record<string | number, unknown>;
  const last = way.at(-1)!;
  place[last] =
    Math.max(1, Math.abs(place[last] as number)) * Math.sign((place[last] as number) || 1) * factor;
  return copy;
}

/** The constants of a design; undefined where one cannot be written as its type. */
async function headerOf(design: FirmwareDesign): Promise<string | undefined> {
  try {
    const files = await renderFirmware(SHEET, design);
    return files.find(({ path }) => path.endsWith('constants.h'))!.text;
  } catch (error) {
    if (error instanceof LiteralError) return undefined;
    throw error;
  }
}

function compiles(header: string | undefined): boolean {
  return header !== undefined && spawnSync('avr-g++', FLAGS, { input: header }).status === 0;
}

it.each(['the demo cart', 'a sweep, dark line, and rules', 'an integral part', 'encoders'])(
  'where the analysis speaks of an overflow the header does not compile: %s',
  { timeout: 120_000 },
  async (name) => {
    const design = quickDesign(cart(CARTS[name]));
    const unchanged = await headerOf(design);
    expect(compiles(unchanged)).toBe(true);
    const { controller, vehicle } = design;
    let refused = 0;
    const unnoticed: string[] = [];
    for (const way of paths(controller)) {
      for (const factor of FACTORS) {
        const changed = scaled(controller, way, factor);
        const said = overflows(changed, vehicle.board.adcMaxCount, 'arduino').map((each) => each.name);
        if (said.length === 0) continue;
        const header = await headerOf({ ...design, controller: changed });
        // a number that this firmware does without
        if (header === unchanged) break;
        refused++;
        if (compiles(header)) unnoticed.push(`${way.join('/')} times ${factor}: ${said.join(', ')}`);
        break;
      }
    }
    expect(unnoticed).toEqual([]);
    expect(refused).toBeGreaterThan(15);
  },
);
