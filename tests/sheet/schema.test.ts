import { Ajv2020 } from 'ajv/dist/2020.js';
import { describe, expect, test } from 'vitest';
import { ANNOTATIONS, SCHEMAS, schemaAt, type SchemaName, type SchemaNode } from '../../src/sheet/schema.js';
import { isUnit } from '../../src/sheet/units.js';

interface Field {
  pointer: string;
  node: SchemaNode;
  /** Entry of a list, or a form that a value may take: neither has a default of its own. */
  isPart: boolean;
}

/** Every schema within a schema, with the pointer to it. */
function fieldsOf(node: SchemaNode, pointer = '#', isPart = true): Field[] {
  const below = [
    ...Object.entries(node.properties ?? {}).map(([key, child]) =>
      fieldsOf(child, `${pointer}/properties/${key}`, false),
    ),
    ...Object.entries(node.$defs ?? {}).map(([key, child]) => fieldsOf(child, `${pointer}/$defs/${key}`)),
    ...(node.anyOf ?? []).map((child, index) => fieldsOf(child, `${pointer}/anyOf/${index}`)),
    ...(node.items ? [fieldsOf(node.items, `${pointer}/items`)] : []),
  ];
  return [{ pointer, node, isPart }, ...below.flat()];
}

const isNumeric = ({ node }: Field): boolean => node.type === 'number' || node.type === 'integer';

describe.each<SchemaName>(['sheet', 'course'])('%s schema', (name) => {
  const schema = SCHEMAS[name];
  const fields = fieldsOf(schema);

  test('is a schema of draft 2020-12, by the meta-schema', () => {
    const ajv = new Ajv2020({ strict: true });
    expect(schema).toHaveProperty('$schema', 'https://json-schema.org/draft/2020-12/schema');
    expect(ajv.validateSchema(schema)).toBe(true);
  });

  test('has no keyword beyond the standard and our annotations: the strict validator takes it', () => {
    const ajv = new Ajv2020({ strict: true });
    ajv.addVocabulary([...ANNOTATIONS]);
    expect(() => ajv.compile(schema)).not.toThrow();
    expect(() => new Ajv2020({ strict: true }).compile(schema)).toThrow(/unknown keyword/);
  });

  test('titles and describes every field', () => {
    // What a $ref points to is among the fields itself.
    const bare = fields.filter(({ node: { title, description, $ref } }) => {
      return $ref === undefined && !(title && /\.$/.test(description ?? ''));
    });
    expect(bare.map(({ pointer }) => pointer)).toEqual([]);
  });

  test('closes every object', () => {
    const open = fields.filter(({ node }) => node.type === 'object' && !('additionalProperties' in node));
    expect(open.map(({ pointer }) => pointer)).toEqual([]);
  });

  test('gives every number limits, every quantity a unit that we convert, every field of its own a default', () => {
    const numbers = fields.filter(isNumeric);
    expect(numbers.length).toBeGreaterThan(5);
    for (const { pointer, node, isPart } of numbers) {
      expect(node.minimum ?? node.exclusiveMinimum, `${pointer} minimum`).toBeTypeOf('number');
      expect(node.maximum, `${pointer} maximum`).toBeTypeOf('number');
      // A pin's number is a label.
      if (pointer !== '#/$defs/pin/anyOf/0') expect(isUnit(node.unit), `${pointer} unit`).toBe(true);
      if (!isPart) expect(node.default, `${pointer} default`).toBeTypeOf('number');
    }
  });

  test('has defaults that fit its own fields', () => {
    const ajv = new Ajv2020({ strict: true });
    ajv.addVocabulary([...ANNOTATIONS]);
    for (const { pointer, node } of fields) {
      if (node.default === undefined) continue;
      const validate = ajv.compile({ ...node, $defs: schema.$defs ?? {} });
      expect(validate(node.default), `${pointer} default`).toBe(true);
    }
  });

  test('bounds every text and every list', () => {
    for (const { pointer, node } of fields) {
      if (node.type === 'array') expect(node.maxItems, `${pointer} maxItems`).toBeTypeOf('number');
      if (node.type === 'string') expect(node.pattern ?? node.maxLength, `${pointer} pattern`).toBeDefined();
      if (node.pattern !== undefined) expect(node.allows, `${pointer} allows`).toBeTypeOf('string');
    }
  });
});

test('says for every number of the sheet what to do when it is refused', () => {
  const silent = fieldsOf(SCHEMAS.sheet).filter(
    (field) => isNumeric(field) && !/^[A-Z0-9].*\.$/.test(field.node.fix ?? ''),
  );
  // A pin is one field with two forms; the field says it.
  expect(silent.map(({ pointer }) => pointer)).toEqual(['#/$defs/pin/anyOf/0']);
});

test.each([
  ['/sensors/pitchMm', 'Sensor spacing'],
  ['/drive/driver/left/pwm', 'PWM pin'],
  ['/sensors/calibration/ground', 'Readings over ground'],
  ['/sensors/calibration/ground/3', 'Reading'],
  ['/speeds/classes/0/speedMps', 'Speed of the class'],
  ['', 'Build sheet'],
  ['/nonsense/deeper', undefined],
  ['/__proto__', undefined],
])('finds the schema of %s', (pointer, title) => {
  expect(schemaAt(SCHEMAS.sheet, pointer)?.title).toBe(title);
});
