import { mkdtemp, readdir, readFile, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import type { Sheet } from '../../src/sheet/sheet-types.js';
import { surveyUnattended } from '../../src/survey/unattended.js';

let folder: string;
beforeEach(async () => {
  folder = await mkdtemp(join(tmpdir(), 'fairlead-survey-'));
});
afterEach(async () => {
  await rm(folder, { recursive: true });
});

function survey(options: { sheet?: string; answers?: string; replace?: boolean } = {}) {
  const at = (name: string | undefined): string | undefined =>
    name === undefined ? name : join(folder, name);
  return surveyUnattended({
    sheetFile: at(options.sheet),
    answersFile: at(options.answers),
    folder,
    replace: options.replace === true,
  });
}

describe('surveyUnattended', () => {
  it('writes the defaults to a file named after the vehicle, the same bytes every time', async () => {
    const first = await survey();
    expect(first).toMatchObject({ file: join(folder, 'tray-cart.json'), changed: true });
    const bytes = await readFile(first.file);
    expect(await survey()).toMatchObject({ changed: false });
    await rm(first.file);
    await survey();
    expect(await readFile(first.file)).toEqual(bytes);
  });

  it('plans pins for a mixed bar, kinds and readings of the analog sensors as told', async () => {
    const answers = {
      '/sensors/kind': 'mixed',
      '/sensors/kinds': 'd a a a a d',
      '/sensors/calibration/mode': 'stored',
      '/sensors/calibration/ground': '110 120 130 140',
    };
    await writeFile(join(folder, 'a.json'), JSON.stringify(answers));
    const { file } = await survey({ answers: 'a.json' });
    const { sensors } = JSON.parse(await readFile(file, 'utf8')) as Sheet;
    expect(sensors.kinds).toEqual(['digital', 'analog', 'analog', 'analog', 'analog', 'digital']);
    expect(sensors.calibration?.ground).toEqual([110, 120, 130, 140]);
    expect(sensors.calibration?.line).toHaveLength(4);
    expect(sensors.pins.slice(1, 5).every((pin) => String(pin).startsWith('A'))).toBe(true);
    expect(sensors.lineLevel).toBe('high');
  });

  it('leaves a sheet alone that says something else, and says what differs', async () => {
    await survey();
    await writeFile(join(folder, 'a.json'), '{ "/line/widthMm": 25 }');
    const before = await readFile(join(folder, 'tray-cart.json'), 'utf8');
    await expect(survey({ answers: 'a.json' })).rejects.toMatchObject({
      exitCode: 2,
      problems: [
        {
          message:
            'The file is there already and says something else. It differs: Line width: 19 mm -> 25 mm.',
          fix: 'Name another file, or add --replace.',
        },
      ],
    });
    expect(await readFile(join(folder, 'tray-cart.json'), 'utf8')).toBe(before);
    await survey({ answers: 'a.json', replace: true });
    expect(await readFile(join(folder, 'tray-cart.json'), 'utf8')).toContain('"widthMm": 25');
  });

  it('builds on the sheet that is named', async () => {
    await survey({ sheet: 'cart.json' });
    await writeFile(join(folder, 'a.json'), '{ "/line/widthMm": 25 }');
    await writeFile(join(folder, 'b.json'), '{ "/power/emptyV": 5 }');
    await survey({ sheet: 'cart.json', answers: 'a.json', replace: true });
    const { sheet } = await survey({ sheet: 'cart.json', answers: 'b.json', replace: true });
    expect(sheet).toMatchObject({ name: 'cart', line: { widthMm: 25 }, power: { emptyV: 5 } });
  });

  it('writes nothing where the answers have problems', async () => {
    await writeFile(join(folder, 'a.json'), '{ "/line/widthMm": 2500 }');
    await expect(survey({ answers: 'a.json' })).rejects.toMatchObject({
      exitCode: 2,
      file: join(folder, 'a.json'),
      problems: [{ pointer: '/line/widthMm', message: '2500 mm is outside 5 to 100 mm.' }],
    });
    expect(await readdir(folder)).toEqual(['a.json']);
  });
});
