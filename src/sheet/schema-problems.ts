/**
 * From the validator's errors to problems that a person can act on.
 *
 * The validator reports every branch of a choice (`anyOf`) that failed; a person wants one sentence. So a choice is reduced to
 * the branch that the value was meant for (the one of its kind), or to one problem that names all that is allowed.
 * A misspelt key is reported as such, and not a second time as a missing one.
 */
import type { ErrorObject } from 'ajv/dist/2020.js';
import type { Problem } from './problem.js';
import { nearest, unknownKeyProblem } from './nearest-key.js';
import { allowedBy, kindOf } from './schema-words.js';
import { SCHEMAS, resolved, schemaAt, schemaErrors, type SchemaName, type SchemaNode } from './schema.js';
import { parseQuantity, isUnit } from './units.js';
import { describeValue, pointerTo, quote, joinAnd, joinOr } from './words.js';

/** So many problems are told one by one; a file with more of them is not a sheet with mistakes but another file. */
const MOST_PROBLEMS = 100;

/** So many errors are looked at: enough for that many problems, each a choice with its branches. */
const MOST_ERRORS = 10 * MOST_PROBLEMS;

/** All problems of `data` against the schema of that name; none if it fits. Pure; never throws. */
export function schemaProblems(name: SchemaName, data: unknown): Problem[] {
  const root = SCHEMAS[name];
  const errors = withoutEchoes(chosenBranches(schemaErrors(name, data).slice(0, MOST_ERRORS)));
  const problems = errors.slice(0, MOST_PROBLEMS).map((error) => problemOf(root, error));
  if (errors.length > MOST_PROBLEMS) {
    const got = `more than ${MOST_PROBLEMS} problems`;
    const message = `There are ${got}; these are the first.`;
    problems.push({ pointer: '', message, got, allowed: 'none', fix: 'Check that this is the right file.' });
  }
  return problems;
}

/** For each failed choice: keeps the errors of the branch that fits the value's kind, or else only the choice's own. */
function chosenBranches(errors: readonly ErrorObject[]): ErrorObject[] {
  const choices = errors.filter((error) => error.keyword === 'anyOf');
  const dropped = new Set<ErrorObject>();
  for (const choice of choices) {
    const inside = (error: ErrorObject, path: string): boolean =>
      error.schemaPath.startsWith(`${path}/`) && isWithin(error.instancePath, choice.instancePath);
    const branches = choice.schema as readonly SchemaNode[];
    const meant = branches.findIndex((branch) => isMeantFor(branch, choice.data));
    const kept = `${choice.schemaPath}/${meant}`;
    if (meant >= 0) dropped.add(choice);
    for (const error of errors) {
      if (inside(error, choice.schemaPath) && !(meant >= 0 && inside(error, kept))) dropped.add(error);
    }
  }
  return errors.filter((error) => !dropped.has(error));
}

function isWithin(path: string, start: string): boolean {
  return path === start || path.startsWith(`${start}/`);
}

function isMeantFor(branch: SchemaNode, data: unknown): boolean {
  if (branch.type === 'array') return Array.isArray(data);
  if (branch.type === 'integer') return typeof data === 'number';
  if (branch.type === 'string') return typeof data === 'string';
  if (branch.type !== 'object' || typeof data !== 'object' || data === null) return false;
  return (branch.required ?? []).every((key) => Object.hasOwn(data, key));
}

/** Drops "is missing" for a key of which a misspelt form is reported anyway. */
function withoutEchoes(errors: readonly ErrorObject[]): ErrorObject[] {
  const misspelt = new Set<string>();
  for (const error of errors) {
    if (error.keyword !== 'additionalProperties') continue;
    const meant = nearest(String(error.params['additionalProperty']), keysOf(error));
    if (meant !== undefined) misspelt.add(`${error.instancePath}${pointerTo(meant)}`);
  }
  return errors.filter(
    (error) =>
      error.keyword !== 'required' ||
      !misspelt.has(`${error.instancePath}${pointerTo(String(error.params['missingProperty']))}`),
  );
}

/** Keys that the object at an error may have and does not have yet. */
function keysOf(error: ErrorObject): string[] {
  const allowed = Object.keys((error.parentSchema as SchemaNode).properties ?? {});
  return allowed.filter((key) => !Object.hasOwn(error.data as object, key));
}

function problemOf(root: SchemaNode, error: ErrorObject): Problem {
  const pointer = error.instancePath;
  if (error.keyword === 'additionalProperties') {
    return unknownKeyProblem(root, pointer, String(error.params['additionalProperty']), keysOf(error));
  }
  if (error.keyword === 'required') return missingProblem(root, error);
  const field = schemaAt(root, pointer) ?? {};
  // Limits come from the branch that failed, words from the field.
  const branch = error.keyword === 'anyOf' ? field : (error.parentSchema as SchemaNode);
  const got = describeValue(error.data, branch.unit);
  const allowed = allowedBy(branch);
  const fix =
    numberInText(error, branch) ??
    nearestChoice(error, branch) ??
    keysToWrite(error, branch) ??
    field.fix ??
    branch.fix ??
    field.description;
  return {
    pointer,
    message: `${got} ${mismatch(error, branch)}.`,
    got,
    allowed,
    ...(fix === undefined ? {} : { fix }),
  };
}

/** The verb of the sentence: "is outside 3 to 30 mm". */
function mismatch(error: ErrorObject, node: SchemaNode): string {
  switch (error.keyword) {
    case 'type':
      return `is not ${kindOf(node)}`;
    case 'minimum':
    case 'maximum':
    case 'exclusiveMinimum':
      return node.type === 'integer' ? `is not ${allowedBy(node)}` : `is outside ${allowedBy(node)}`;
    case 'minItems':
    case 'maxItems':
      return `is not ${allowedBy(node)}`;
    default:
      return `is not allowed here: it takes ${allowedBy(node)}`;
  }
}

function missingProblem(root: SchemaNode, error: ErrorObject): Problem {
  const key = String(error.params['missingProperty']);
  const pointer = `${error.instancePath}${pointerTo(key)}`;
  const field = resolved(root, (error.parentSchema as SchemaNode).properties?.[key] ?? {});
  const allowed = allowedBy(field);
  const meaning = field.description === undefined ? '' : ` ${field.description}`;
  return { pointer, message: `${quote(key)} is missing.`, got: 'nothing', allowed, fix: `Add it.${meaning}` };
}

/** "10 mm" in quotes where a number belongs: says which number to write. */
function numberInText(error: ErrorObject, node: SchemaNode): string | undefined {
  if (error.keyword !== 'type' || typeof error.data !== 'string') return undefined;
  const unit = node.unit ?? '1';
  if ((node.type !== 'number' && node.type !== 'integer') || !isUnit(unit)) return undefined;
  const quantity = parseQuantity(error.data, unit);
  if (!quantity.ok) return undefined;
  return `Write ${quantity.value} without quotes${unit === '1' ? '' : `; the unit is always ${unit}`}.`;
}

/** A wrong choice: says which one was probably meant, or what there is. */
function nearestChoice(error: ErrorObject, node: SchemaNode): string | undefined {
  if (error.keyword !== 'enum') return undefined;
  const choices = (node.enum ?? []).map(String);
  const near = typeof error.data === 'string' ? nearest(error.data, choices) : undefined;
  return near === undefined ? `Choose ${joinOr(choices)}.` : `Did you mean ${quote(near)}?`;
}

/** Something else where an object belongs: says which keys it has. */
function keysToWrite(error: ErrorObject, node: SchemaNode): string | undefined {
  if (error.keyword !== 'type' || node.type !== 'object') return undefined;
  return `Write an object with the keys ${joinAnd(node.required ?? Object.keys(node.properties ?? {}))}.`;
}
