/** Every sound sheet renders, and what is rendered compiles: a thousand random sheets, and a sample of the sketches. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { overflows } from '../../src/design/intervals.js';
import { type RenderedFile, renderFirmware } from '../../src/firmware/render.js';
import { buildSketch } from '../../src/rehearsal/chip-build.js';
import { checkSheet } from '../../src/sheet/check.js';
import type { Sheet } from '../../src/sheet/sheet-types.js';
import { toVehicle } from '../../src/sheet/to-vehicle.js';
import type { BoardId } from '../../src/vehicle/board-facts.js';
import { BOARDS } from '../../src/vehicle/boards.js';
import { SHEET, quickDesign } from '../firmware/cart.js';
import { validSheets } from './valid-sheets.js';

const SHEETS = 1000;
const COMPILED = 30;

interface Rendered {
  board: BoardId;
  language: string;
  files: RenderedFile[];
}

async function render(given: Sheet): Promise<Rendered> {
  const { sheet } = checkSheet(given);
  if (sheet === undefined) throw new Error('The sheet is not sound.');
  const design = quickDesign(toVehicle(sheet));
  const { board, language } = design.vehicle;
  expect(overflows(design.controller, board.adcMaxCount, language)).toEqual([]);
  return { board: board.id, language, files: await renderFirmware(SHEET, design) };
}

describe('random sound sheets', () => {
  const sheets = fc.sample(validSheets, { numRuns: SHEETS, seed: 2 });

  it(`render, ${SHEETS} of them`, { timeout: 240_000 }, async () => {
    for (const sheet of sheets) {
      const { files } = await render(sheet);
      expect(files.length).toBeGreaterThan(4);
      for (const { path, text } of files) {
        expect(path.startsWith(`${sheet.name}/`)).toBe(true);
        expect(text, path).not.toMatch(/undefined|NaN|Infinity|\[object/);
      }
    }
  });

  it(`compile without a warning, ${COMPILED} sketches of them`, { timeout: 240_000 }, async () => {
    const sketches = sheets.filter(({ target }) => target.language === 'arduino').slice(0, COMPILED);
    expect(sketches).toHaveLength(COMPILED);
    for (const sheet of sketches) {
      const { files, board } = await render(sheet);
      const { warnings, flashBytes, ramBytes, stack } = await buildSketch(files, board);
      expect(warnings, JSON.stringify(sheet)).toEqual([]);
      expect(flashBytes).toBeGreaterThan(2000);
      expect(ramBytes + stack.deepestBytes, JSON.stringify(sheet)).toBeLessThan(BOARDS[board].ramBytes! / 2);
    }
  });
});
