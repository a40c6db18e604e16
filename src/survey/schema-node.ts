/** The sheet's fields as the questionnaire uses them: it has no wording of its own for a field. */
import { type SchemaNode as AnyNode, SCHEMAS, schemaAt } from '../sheet/schema.js';
import type { Json } from './json-tree.js';

/** A field of the sheet: every one has a title and a description. Limits are in `unit`. */
export type SchemaNode = Omit<AnyNode, 'default' | 'enum'> & {
  title: string;
  description: string;
  default?: Json;
  enum?: readonly string[];
};

/**
 * The field at a pointer into a sheet, e.g. "/sensors/pitchMm" or "/sensors/pins/2".
 * Throws a RangeError where the schema has no such field: a slip in the list of questions, not in anybody's input.
 */
export function nodeAt(pointer: string): SchemaNode {
  const node = schemaAt(SCHEMAS.sheet, pointer);
  if (node?.title === undefined || node.description === undefined) {
    throw new RangeError(`the schema has no described field ${pointer}`);
  }
  return node as SchemaNode;
}

/** Keys of the object at a pointer in the schema's order. */
export function keyOrder(pointer: string): string[] {
  return Object.keys(schemaAt(SCHEMAS.sheet, pointer)?.properties ?? {});
}

/**
 * What each choice of an enumeration means. The schema's descriptions explain a choice as `choice: meaning.`;
 * a choice that speaks for itself has no such sentence and gets none here.
 */
export function meanings(node: SchemaNode): Map<string, string> {
  const found = new Map<string, string>();
  for (const choice of node.enum ?? []) {
    const start = node.description.indexOf(`${choice}: `);
    if (start < 0) continue;
    const rest = node.description.slice(start + choice.length + 2);
    const end = rest.search(/\.(\s|$)/);
    found.set(choice, end < 0 ? rest : rest.slice(0, end));
  }
  return found;
}
