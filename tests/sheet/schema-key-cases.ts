/** Missing, misspelt and misplaced keys, and the problems that the schema finds. */
import type { SchemaProblemCase } from './schema-problem-cases.js';

export const SCHEMA_KEY_CASES: SchemaProblemCase[] = [
  {
    when: 'a missing key',
    changes: { '/drive/motor/noLoadRpm': undefined },
    want: [
      {
        pointer: '/drive/motor/noLoadRpm',
        message: '"noLoadRpm" is missing.',
        got: 'nothing',
        allowed: '20 to 10000 rpm',
        fix: 'Add it. Speed of the output shaft without load at the rated voltage.',
      },
    ],
  },
  {
    when: 'a misspelt key: said once, not also as missing',
    changes: { '/sensors/pins': undefined, '/sensors/pin': ['A0'] },
    want: [
      {
        pointer: '/sensors/pin',
        message: 'The key "pin" is unknown in /sensors.',
        got: '"pin"',
        allowed: 'kinds, positionsMm, pins or lineLevel',
        fix: 'Did you mean "pins"?',
      },
    ],
  },
  {
    when: 'a misspelt key beside the right one',
    changes: { '/sensors/pichMm': 12 },
    want: [
      {
        pointer: '/sensors/pichMm',
        message: 'The key "pichMm" is unknown in /sensors.',
        got: '"pichMm"',
        allowed: 'kinds, positionsMm or lineLevel',
        fix: 'It looks like "pitchMm", which is given already: remove it.',
      },
    ],
  },
  {
    when: 'a key in the wrong place',
    changes: { '/wheelDiameterMm': 42 },
    want: [
      {
        pointer: '/wheelDiameterMm',
        message: 'The key "wheelDiameterMm" is unknown in the file.',
        got: '"wheelDiameterMm"',
        allowed: 'encoders, led or stopPin',
        fix: 'Move it into /drive.',
      },
    ],
  },
];
