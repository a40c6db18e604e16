/** From answers to a sheet: answers where there are any, else the sheet at hand, else the schema's defaults. */
import { hasEncoders } from './encoders.js';
import { type Facts, IS_READING } from './facts.js';
import { isObject, type Json, type JsonObject, withoutValue, withValue } from './json-tree.js';
import { spread } from './lists.js';
import { IS_PIN, pinValues } from './pins.js';
import { entriesFor } from './questions.js';
import { keyOrder } from './schema-node.js';

/** The sheet that the facts make. Details of the sheet at hand that are not asked for stay as they are. */
export function assemble(facts: Facts): JsonObject {
  let sheet: JsonObject = { ...facts.base };
  sheet = withValue(sheet, '/$schema', facts.get('/$schema') ?? '');
  sheet = withValue(sheet, '/sheetVersion', facts.get('/sheetVersion') ?? 1);
  sheet = withValue(sheet, '/target/language', facts.board.language);
  for (const pointer of outOfPlace(facts)) sheet = withoutValue(sheet, pointer);
  for (const { id, make } of entriesFor(facts)) {
    if (id.startsWith('#') || IS_PIN.test(id)) continue;
    const value = make(facts).defaultValue;
    sheet = withValue(sheet, id, IS_READING.test(id) ? spread(value, facts.analogCount) : value);
  }
  for (const [pointer, pin] of pinValues(facts)) sheet = withValue(sheet, pointer, pin);
  return inOrder(sheet, '') as JsonObject;
}

/** What a sheet must not hold along with the answers. */
function outOfPlace(facts: Facts): string[] {
  const readings = ['/sensors/calibration/ground', '/sensors/calibration/line'];
  return [
    facts.row === 'even' ? '/sensors/positionsMm' : '/sensors/pitchMm',
    ...(facts.sensorKind === 'analog' ? ['/sensors/lineLevel'] : []),
    ...(facts.sensorKind === 'digital' ? ['/sensors/calibration'] : []),
    ...(facts.sensorKind === 'mixed' ? [] : ['/sensors/kinds']),
    // A sweep measures anew; readings at hand stay as long as they fit.
    ...readings.filter((pointer) => facts.given(pointer) === undefined),
    ...(hasEncoders(facts) ? [] : ['/encoders']),
    ...['left', 'right'].flatMap((side) => ['a', 'b'].map((key) => `/encoders/${side}/${key}`)),
    '/sensors/pins',
    '/drive/driver/standbyPin',
    '/stopPin',
    ...['left', 'right'].flatMap((side) =>
      ['pwm', 'dir', 'in1', 'in2'].map((key) => `/drive/driver/${side}/${key}`),
    ),
  ];
}

/** Keys in the schema's order; keys that the schema does not have come last. */
function inOrder(value: Json, pointer: string): Json {
  if (!isObject(value)) return value;
  const order = keyOrder(pointer);
  const place = (key: string): number => (order.includes(key) ? order.indexOf(key) : order.length);
  const keys = Object.keys(value).sort((a, b) => place(a) - place(b));
  return Object.fromEntries(keys.map((key) => [key, inOrder(value[key] ?? null, `${pointer}/${key}`)]));
}
