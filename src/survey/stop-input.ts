/** Whether a contact stops the vehicle. */
import type { Facts } from './facts.js';
import { valueAt } from './json-tree.js';

/** Whether a contact is to stop the vehicle. */
export function hasStopInput(facts: Facts): boolean {
  const answer = facts.answers['#stopInput'];
  return typeof answer === 'boolean' ? answer : valueAt(facts.base, '/stopPin') !== undefined;
}
