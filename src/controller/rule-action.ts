/** What the rule table says for a run of sensors on the line. */
import { clamp } from './clamp.js';
import { FRACTION_BITS, FULL_SPEED, RULE_CURVATURE_BITS, type RuleConstants } from './constants.js';

/** Curvature that the wheels' difference stands for, curvature units. */
export function ruleCurvature(rules: RuleConstants, index: number): number {
  const difference = (rules.right[index] as number) - (rules.left[index] as number);
  return (difference * rules.curvatureFactor) >> RULE_CURVATURE_BITS;
}

/** A speed scaled by the wheels' mean fraction, speed units. */
export function ruleSpeed(rules: RuleConstants, index: number, speed: number): number {
  const sum = (rules.left[index] as number) + (rules.right[index] as number);
  return clamp((speed * sum) >> (FRACTION_BITS + 1), 2 * FULL_SPEED);
}
