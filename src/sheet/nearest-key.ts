/** Unknown keys, and what was probably meant. */
import { distance } from 'fastest-levenshtein';
import type { Problem } from './problem.js';
import { resolved, schemaAt, type SchemaNode } from './schema.js';
import { joinOr, pointerTo, quote } from './words.js';

/** No name of ours is longer; a longer text is not a misspelt one, and comparing it would cost time. */
const LONGEST_NAME = 40;

/** The candidate nearest to `text` by edit distance, letter case aside, if it is near at all. */
export function nearest(text: string, candidates: readonly string[]): string | undefined {
  if (text.length > LONGEST_NAME) return undefined;
  const wanted = text.toLowerCase();
  let best: string | undefined;
  let bestDistance = Infinity;
  for (const candidate of candidates) {
    const found = distance(wanted, candidate.toLowerCase());
    if (found < bestDistance && found <= Math.max(1, Math.floor(candidate.length / 3))) {
      best = candidate;
      bestDistance = found;
    }
  }
  return best;
}

/** The problem of a key that the object at `pointer` cannot have; `free` are the keys it could still have. */
export function unknownKeyProblem(
  root: SchemaNode,
  pointer: string,
  key: string,
  free: readonly string[],
): Problem {
  const place = pointer === '' ? 'the file' : pointer;
  return {
    pointer: `${pointer}${pointerTo(key)}`,
    message: `The key ${quote(key)} is unknown in ${place}.`,
    got: quote(key),
    allowed: free.length === 0 ? 'no further key' : joinOr(free),
    fix: fixFor(root, pointer, key, free),
  };
}

function fixFor(root: SchemaNode, pointer: string, key: string, free: readonly string[]): string {
  const near = nearest(key, free);
  if (near !== undefined) return `Did you mean ${quote(near)}?`;
  const given = nearest(key, Object.keys(schemaAt(root, pointer)?.properties ?? {}));
  if (given !== undefined) return `It looks like ${quote(given)}, which is given already: remove it.`;
  const home = homesOf(root, root, key).find((found) => found !== pointer);
  if (home === undefined) return 'Remove it.';
  return home === '' ? 'Move it to the top of the file.' : `Move it into ${home}.`;
}

/** Pointers of all objects in the format that have a key of this name; lists are not entered. */
function homesOf(root: SchemaNode, node: SchemaNode, key: string, at = ''): string[] {
  const { properties } = resolved(root, node);
  if (!properties) return [];
  const below = Object.entries(properties).flatMap(([name, child]) =>
    homesOf(root, child, key, `${at}${pointerTo(name)}`),
  );
  return Object.hasOwn(properties, key) ? [at, ...below] : below;
}
