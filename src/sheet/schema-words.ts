/** What a schema allows, in words. */
import type { SchemaNode } from './schema.js';
import { joinOr, withUnit } from './words.js';

/** A value of a schema as a person would write it: texts without quotes. */
function plainValue(value: unknown): string {
  return typeof value === 'string' ? value : JSON.stringify(value);
}

/** "3 to 30 mm", "above 0 and at most 1000 mm". */
function range(node: SchemaNode): string | undefined {
  const { minimum, maximum, exclusiveMinimum, unit } = node;
  const most = maximum === undefined ? undefined : withUnit(maximum, unit);
  if (minimum !== undefined)
    return most === undefined ? `at least ${withUnit(minimum, unit)}` : `${minimum} to ${most}`;
  if (exclusiveMinimum !== undefined) {
    const least = `above ${withUnit(exclusiveMinimum, unit)}`;
    return most === undefined ? least : `above ${exclusiveMinimum} and at most ${most}`;
  }
  return most === undefined ? undefined : `at most ${most}`;
}

/** What is allowed, e.g. "3 to 30 mm", "a whole number from 2 to 16", "uno or nano", "a list of 2 to 16 entries". */
export function allowedBy(node: SchemaNode): string {
  if (node.const !== undefined) return plainValue(node.const);
  if (node.enum) return joinOr(node.enum.map(plainValue));
  if (node.anyOf) return joinOr(node.anyOf.map(allowedBy));
  switch (node.type) {
    case 'number':
      return range(node) ?? 'a number';
    case 'integer':
      return node.minimum === undefined ? 'a whole number' : `a whole number from ${range(node) ?? ''}`;
    case 'boolean':
      return 'true or false';
    case 'string':
      return node.allows ?? 'text';
    case 'array':
      return `a list of ${node.minItems ?? 0} to ${node.maxItems ?? 'any number of'} entries`;
    case 'object':
      return 'an object: { ... }';
    default:
      return 'something else';
  }
}

/** The kind of value that a schema wants: "a number of mm", "text". */
export function kindOf(node: SchemaNode): string {
  switch (node.type) {
    case 'number':
    case 'integer': {
      const number = node.type === 'integer' ? 'a whole number' : 'a number';
      return node.unit === undefined || node.unit === '1' ? number : `${number} of ${node.unit}`;
    }
    case 'array':
      return 'a list';
    case 'object':
      return 'an object';
    case 'string':
      return 'text';
    default:
      return allowedBy(node);
  }
}
