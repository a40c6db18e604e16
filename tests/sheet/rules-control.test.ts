import { testRules } from './rule-cases.js';

const rulesBy = (...states: string[]) => ({
  '/control': { kind: 'rules', overrides: states.map((state) => ({ state, left: 0.5, right: 1.5 })) },
});

const GAINS = { proportionalPerM2: 300, derivativeTimeMs: 80 };

testRules({
  'rule-overrides': [
    {
      when: 'feedback with rules by hand',
      changes: { '/control': { kind: 'pid', overrides: [{ state: '100000', left: 0, right: 1.9 }] } },
      want: ['/control/overrides: Rules by hand need the controller kind "rules", not "pid".'],
    },
    {
      when: 'a state of another bar, one of two runs, one given twice',
      changes: rulesBy('10000', '100001', '000110', '000110'),
      want: [
        '/control/overrides/0/state: State "10000" has 5 digits, the bar has 6 sensors.',
        '/control/overrides/1/state: State "100001" is no single run of sensors on the line; only such states have an action of their own.',
        '/control/overrides/3/state: State "000110" is given twice.',
      ],
    },
    { when: 'sound rules by hand', changes: rulesBy('100000', '011000'), want: [] },
  ],
  'integral-part': [
    {
      when: 'a rule table that is to integrate',
      changes: { '/control': { kind: 'rules', integral: 'always' } },
      want: ['/control/integral: An integral part needs the controller kind "pid", not "rules".'],
    },
    {
      when: 'gains by hand without an integral part',
      changes: { '/control': { kind: 'pid', integral: 'always', gains: GAINS } },
      want: ['/control/integral: The gains by hand have no integral part.'],
    },
    {
      when: 'gains by hand with one',
      changes: {
        '/control': { kind: 'pid', integral: 'always', gains: { ...GAINS, integralDistanceMm: 800 } },
      },
      want: [],
    },
  ],
});
