/** Whether the wheels have encoders, and how many pins each takes. */
import type { Facts } from './facts.js';
import { valueAt } from './json-tree.js';

/** Whether the wheels have encoders. */
export function hasEncoders(facts: Facts): boolean {
  const answer = facts.answers['#encoders'];
  return typeof answer === 'boolean' ? answer : valueAt(facts.base, '/encoders') !== undefined;
}

/** Channels of each encoder; none without encoders. */
export function encoderChannels(facts: Facts): readonly ('a' | 'b')[] {
  if (!hasEncoders(facts)) return [];
  return facts.text('/encoders/channels') === 'quadrature' ? ['a', 'b'] : ['a'];
}
