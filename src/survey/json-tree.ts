/**
 * JSON values and their parts by JSON pointer (RFC 6901). Every function leaves its arguments as they are.
 */

export type Json = null | boolean | number | string | Json[] | { [key: string]: Json };
export type JsonObject = Record<string, Json>;

/** Whether a value is a JSON object (not an array, not null). */
export function isObject(value: unknown): value is JsonObject {
  return typeof value === 'object' && value !== null && !Array.isArray(value);
}

function keysOf(pointer: string): string[] {
  return pointer
    .split('/')
    .slice(1)
    .map((key) => key.replaceAll('~1', '/').replaceAll('~0', '~'));
}

function child(node: Json | undefined, key: string): Json | undefined {
  if (Array.isArray(node)) return /^\d+$/.test(key) ? node[Number(key)] : undefined;
  return isObject(node) && Object.hasOwn(node, key) ? node[key] : undefined;
}

/** The value at a pointer, or undefined where there is none. */
export function valueAt(tree: Json, pointer: string): Json | undefined {
  let node: Json | undefined = tree;
  for (const key of keysOf(pointer)) node = child(node, key);
  return node;
}

/** A copy of the tree with one value set; missing objects on the way are made. */
export function withValue(tree: JsonObject, pointer: string, value: Json): JsonObject {
  return place(tree, keysOf(pointer), value) as JsonObject;
}

function place(node: Json | undefined, keys: readonly string[], value: Json): Json {
  const [key, ...rest] = keys;
  if (key === undefined) return value;
  if (Array.isArray(node)) {
    const copy = [...node];
    copy[Number(key)] = place(copy[Number(key)], rest, value);
    return copy;
  }
  // Built from entries, so that a key such as __proto__ is a key like any other.
  const entries = isObject(node) ? Object.entries(node).filter(([name]) => name !== key) : [];
  const placed: [string, Json] = [key, place(child(node, key), rest, value)];
  const old = isObject(node) ? Object.keys(node).indexOf(key) : -1;
  entries.splice(old < 0 ? entries.length : old, 0, placed);
  return Object.fromEntries(entries);
}

/** A copy of the tree without the value at the pointer. */
export function withoutValue(tree: JsonObject, pointer: string): JsonObject {
  return remove(tree, keysOf(pointer)) as JsonObject;
}

function remove(node: Json, keys: readonly string[]): Json {
  const [key, ...rest] = keys;
  if (key === undefined || !isObject(node)) return node;
  const entries = Object.entries(node).filter(([name]) => name !== key || rest.length > 0);
  return Object.fromEntries(
    entries.map(([name, value]) => [name, name === key ? remove(value, rest) : value]),
  );
}

/** Whether two JSON values are the same, whatever the order of their keys. */
export function sameJson(a: Json | undefined, b: Json | undefined): boolean {
  if (Array.isArray(a) && Array.isArray(b)) {
    return a.length === b.length && a.every((item, index) => sameJson(item, b[index]));
  }
  if (isObject(a) && isObject(b)) {
    const keys = Object.keys(a);
    return keys.length === Object.keys(b).length && keys.every((key) => sameJson(a[key], child(b, key)));
  }
  return a === b;
}

/** Every leaf of a tree with its pointer; an array without objects in it counts as one leaf. */
export function leavesOf(tree: Json, pointer = ''): [pointer: string, value: Json][] {
  if (Array.isArray(tree) ? !tree.some(isObject) : !isObject(tree)) return [[pointer, tree]];
  return Object.entries(tree as JsonObject).flatMap(([key, value]) =>
    leavesOf(value, `${pointer}/${key.replaceAll('~', '~0').replaceAll('/', '~1')}`),
  );
}
