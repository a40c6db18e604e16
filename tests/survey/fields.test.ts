import { describe, expect, it } from 'vitest';
import { checkSheet } from '../../src/sheet/check.js';
import { SCHEMAS, schemaAt } from '../../src/sheet/schema.js';
import { Facts } from '../../src/survey/facts.js';
import { fieldQuestion } from '../../src/survey/fields.js';
import { entriesFor } from '../../src/survey/questions.js';
import { meanings, nodeAt } from '../../src/survey/schema-node.js';

const fresh = new Facts({}, {});
const question = (pointer: string) => fieldQuestion(pointer, fresh);

describe('a question about a number', () => {
  it.each([
    ['/sensors/pitchMm', '6.5', 6.5],
    ['/sensors/pitchMm', '1 cm', 10],
    ['/sensors/pitchMm', '0,95cm', 9.5],
    ['/drive/wheelDiameterMm', '2.5in', 63.5],
    ['/drive/motor/timeConstantMs', '80 ms', 80],
    ['/drive/motor/timeConstantMs', '0.08 s', 80],
    ['/drive/massKg', '600 g', 0.6],
    ['/start/countdownS', '500 ms', 0.5],
    ['/drive/gripCoefficient', '0,7', 0.7],
    ['/sensors/count', '8', 8],
  ])('%s takes %s', (pointer, typed, value) => {
    expect(question(pointer).read(typed)).toEqual({ value });
  });

  it.each([
    [
      '/sensors/pitchMm',
      '95',
      '95 mm is outside 3 to 30 mm. Measure centre to centre between neighbouring sensors.',
    ],
    [
      '/sensors/pitchMm',
      '9.5 cm',
      '95 mm is outside 3 to 30 mm. Measure centre to centre between neighbouring sensors.',
    ],
    ['/sensors/count', '6.5', '6.5 is not a whole number; allowed: 2 to 16.'],
    ['/drive/massKg', '6 mm', '"6 mm": the unit "mm" does not fit here; use kg, g, lb or oz.'],
    ['/line/widthMm', 'wide', '"wide" is not a number of mm; write for example 65, 65 mm, 6.5 cm or 2.5 in.'],
  ])('%s refuses %s and says what is allowed', (pointer, typed, problem) => {
    expect(question(pointer).read(typed)).toEqual({ problem });
  });

  it('shows limits and default with their unit', () => {
    const pitch = question('/sensors/pitchMm');
    expect(pitch.allowed).toBe('3 to 30 mm');
    expect(pitch.show(pitch.defaultValue)).toBe('10 mm');
    expect(pitch.help.at(-1)).toBe('Allowed: 3 to 30 mm. Default: 10 mm.');
    expect(question('/drive/gripCoefficient').allowed).toBe('0.1 to 1.5');
  });
});

describe('a question about a name', () => {
  it('says what a name may be', () => {
    const name = question('/name');
    expect(name.read('bench-cart')).toEqual({ value: 'bench-cart' });
    expect(name.read('../x')).toEqual({
      problem:
        '"../x" does not fit. Allowed: a letter, then letters, digits, hyphens or underscores, 40 characters at most. ' +
        'Choose a short plain name such as tray-cart.',
    });
  });
});

describe('choices', () => {
  it('carry the meaning that the schema gives them', () => {
    expect(meanings(nodeAt('/control/kind'))).toEqual(
      new Map([
        ['pid', 'feedback on the measured offset'],
        ['rules', 'a table with one action for each sensor state'],
      ]),
    );
  });

  it.each(['/sensors/kind', '/sensors/calibration/mode', '/drive/driver/scheme', '/control/kind'])(
    '%s: every choice has a meaning',
    (pointer) => {
      const node = nodeAt(pointer);
      expect([...meanings(node).keys()]).toEqual(node.enum);
    },
  );
});

describe('the questions', () => {
  it('say why they are asked, and offer what is allowed', () => {
    for (const { id, make } of entriesFor(fresh)) {
      const asked = make(fresh);
      expect(asked.title, id).not.toBe('');
      if (id !== '#row') expect(asked.why, id).not.toBe('');
      expect(asked.judged(asked.defaultValue), id).toEqual({ value: asked.defaultValue });
    }
  });

  it('cover every field that a sheet must have', () => {
    const ids = entriesFor(fresh).map(({ id }) => id);
    const required = (pointer: string): string[] => {
      const node = schemaAt(SCHEMAS.sheet, pointer);
      if (!node?.required) return [pointer];
      return node.required.flatMap((key) => required(`${pointer}/${key}`));
    };
    // Version and language follow from the rest; pins are one question.
    const implied =
      /^\/(sheetVersion|target\/language|sensors\/pins|drive\/driver\/(left|right)|start\/buttonPin)$/;
    for (const pointer of required('').filter((each) => !implied.test(each))) expect(ids).toContain(pointer);
  });

  it('read back what they show', () => {
    for (const { id, make } of entriesFor(fresh)) {
      const { choices, defaultValue, read, show } = make(fresh);
      if (choices) continue;
      expect(read(show(defaultValue)), id).toEqual({ value: defaultValue });
    }
  });
});

it('checkSheet refuses what the questions refuse', () => {
  // One sample, so that the two cannot drift apart unseen.
  const { problems } = checkSheet({ sensors: { pitchMm: 95 } });
  const read = question('/sensors/pitchMm').read('95');
  const found = problems.find(({ pointer }) => pointer === '/sensors/pitchMm');
  expect(read).toEqual({ problem: `${found?.message ?? ''} ${found?.fix ?? ''}` });
});
