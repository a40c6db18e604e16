import type { Problem } from '../problem.js';
import type { SheetRule } from './rule.js';

export const rule: SheetRule = {
  name: 'without-effect',
  level: 'note',
  why: 'A value that nothing reads was perhaps meant for something else.',
  check({ given }) {
    const { kind, kinds, calibration, lineLevel } = given.sensors;
    const notes: Problem[] = [];
    if (kind === 'digital' && calibration !== undefined) {
      const message = 'Digital sensors have no readings to calibrate, so the calibration has no effect.';
      notes.push({ pointer: '/sensors/calibration', message, fix: 'Remove it, or write "kind": "analog".' });
    }
    if (kind === 'analog' && lineLevel !== undefined) {
      const message = 'The level over the line is for digital sensors, so it has no effect.';
      notes.push({ pointer: '/sensors/lineLevel', message, fix: 'Remove it, or write "kind": "digital".' });
    }
    if (kind !== 'mixed' && kinds !== undefined) {
      const message = 'Kinds of single sensors are for a mixed bar, so they have no effect.';
      notes.push({ pointer: '/sensors/kinds', message, fix: 'Remove them, or write "kind": "mixed".' });
    }
    const { kind: controller, stateMemory, swingMm } = given.control;
    if (controller === 'pid' && (stateMemory !== undefined || swingMm !== undefined)) {
      const pointer = stateMemory === undefined ? '/control/swingMm' : '/control/stateMemory';
      const message = 'Memory of the state and largest swing are for a rule table, so they have no effect.';
      notes.push({ pointer, message, fix: 'Remove it, or write "kind": "rules".' });
    }
    return notes;
  },
};
