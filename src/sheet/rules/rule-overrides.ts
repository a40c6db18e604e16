import type { Problem } from '../problem.js';
import { pointerTo, quote } from '../words.js';
import type { SheetRule } from './rule.js';

/** Ones that stand together, with nothing but zeros around them. */
const ONE_RUN = /^0*1+0*$/;

export const rule: SheetRule = {
  name: 'rule-overrides',
  level: 'problem',
  why: 'The firmware holds one action for each run of sensors on the line; every other state is answered by one of them.',
  check({ sheet }) {
    const { overrides, kind } = sheet.control;
    if (overrides === undefined) return [];
    if (kind !== 'rules') {
      return [
        {
          pointer: pointerTo('control', 'overrides'),
          message: `Rules by hand need the controller kind ${quote('rules')}, not ${quote(kind)}.`,
          got: quote(kind),
          allowed: quote('rules'),
          fix: 'Set /control/kind to rules, or remove the rules by hand.',
        },
      ];
    }
    const states = overrides.map(({ state }) => state);
    return states.flatMap((state, index) => problemsOf(state, index, states, sheet.sensors.count));
  },
};

function problemsOf(state: string, index: number, states: readonly string[], count: number): Problem[] {
  const pointer = pointerTo('control', 'overrides', index, 'state');
  const got = quote(state);
  if (state.length !== count) {
    return [
      {
        pointer,
        message: `State ${got} has ${state.length} digits, the bar has ${count} sensors.`,
        got,
        allowed: `${count} digits`,
        fix: 'Write one digit for each sensor, leftmost first.',
      },
    ];
  }
  if (!ONE_RUN.test(state)) {
    return [
      {
        pointer,
        message: `State ${got} is no single run of sensors on the line; only such states have an action of their own.`,
        got,
        allowed: 'ones that stand together',
        fix: 'Override the run that answers it: its widest one.',
      },
    ];
  }
  if (states.indexOf(state) !== index) {
    return [
      {
        pointer,
        message: `State ${got} is given twice.`,
        got,
        allowed: 'each state once',
        fix: 'Remove one of the two.',
      },
    ];
  }
  return [];
}
