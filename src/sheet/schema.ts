/**
 * The JSON schemas (draft 2020-12) of our file formats: read once, compiled once, and looked up field by field.
 *
 * Beside the standard keywords a field carries `unit`, `why` (why it is asked), `allows` (a pattern in words) and `fix` (what to
 * do when the value is refused). They are registered, so that the validator stays strict about every other unknown keyword.
 */
import { readFileSync } from 'node:fs';
import { Ajv2020, type ErrorObject, type ValidateFunction } from 'ajv/dist/2020.js';

/** One schema, with the keywords that our schemas use. */
export interface SchemaNode {
  title?: string;
  description?: string;
  unit?: string;
  why?: string;
  allows?: string;
  fix?: string;
  type?: 'object' | 'array' | 'string' | 'number' | 'integer' | 'boolean';
  const?: unknown;
  enum?: readonly unknown[];
  default?: unknown;
  minimum?: number;
  maximum?: number;
  exclusiveMinimum?: number;
  pattern?: string;
  maxLength?: number;
  minItems?: number;
  maxItems?: number;
  required?: readonly string[];
  properties?: Readonly<Record<string, SchemaNode>>;
  items?: SchemaNode;
  anyOf?: readonly SchemaNode[];
  $ref?: string;
  $defs?: Readonly<Record<string, SchemaNode>>;
}

export type SchemaName = 'sheet' | 'course';

function readSchema(name: SchemaName): SchemaNode {
  const file = new URL(`../../schemas/${name}.schema.json`, import.meta.url);
  return JSON.parse(readFileSync(file, 'utf8')) as SchemaNode;
}

/** The schemas as they stand in `schemas/`. */
export const SCHEMAS: Readonly<Record<SchemaName, SchemaNode>> = {
  sheet: readSchema('sheet'),
  course: readSchema('course'),
};

/** Our own annotation keywords. */
export const ANNOTATIONS = ['unit', 'why', 'allows', 'fix'] as const;

const compiled = new Map<SchemaName, ValidateFunction>();

function validatorOf(name: SchemaName): ValidateFunction {
  const known = compiled.get(name);
  if (known) return known;
  const ajv = new Ajv2020({ strict: true, allErrors: true, verbose: true });
  ajv.addVocabulary([...ANNOTATIONS]);
  const validator = ajv.compile(SCHEMAS[name]);
  compiled.set(name, validator);
  return validator;
}

/** Everything in which `data` departs from the schema, as the validator puts it. */
export function schemaErrors(name: SchemaName, data: unknown): readonly ErrorObject[] {
  const validator = validatorOf(name);
  return validator(data) ? [] : (validator.errors ?? []);
}

/** A schema with its `$ref` followed; what stands beside the `$ref` wins. */
export function resolved(root: SchemaNode, node: SchemaNode): SchemaNode {
  const name = node.$ref?.replace('#/$defs/', '');
  const target = name === undefined ? undefined : root.$defs?.[name];
  return target ? { ...target, ...node } : node;
}

/** The schema of the field at a JSON pointer, or undefined where the format has none. */
export function schemaAt(root: SchemaNode, pointer: string): SchemaNode | undefined {
  let node: SchemaNode | undefined = root;
  for (const part of pointer.split('/').slice(1)) {
    const key = part.replaceAll('~1', '/').replaceAll('~0', '~');
    node = node && childOf(root, node, key);
  }
  return node;
}

function childOf(root: SchemaNode, node: SchemaNode, key: string): SchemaNode | undefined {
  for (const form of [node, ...(node.anyOf ?? [])]) {
    const { properties, items } = form;
    const child = properties && Object.hasOwn(properties, key) ? properties[key] : items;
    if (child) return resolved(root, child);
  }
  return undefined;
}
