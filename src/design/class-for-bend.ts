/** Which speed class serves a bend. */
import type { ClassSettings } from './design.js';

/** Rounding allowed between the radius of a bend and that of its class. */
const ROUNDING = 1e-9;

/**
 * The class that serves bends of a radius: the first, from wide to tight, whose smallest radius is not above it; the last one
 * for still tighter bends.
 *
 * @param classes at least one, largest radius first
 * @param radiusM above 0, m
 */
export function classForBend<Class extends ClassSettings>(classes: readonly Class[], radiusM: number): Class {
  const serves = classes.find((each) => each.minRadiusM <= radiusM * (1 + ROUNDING));
  return serves ?? classes[classes.length - 1]!;
}
