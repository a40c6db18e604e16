/** The demo sheet, and changed copies of it. */
import { readFileSync } from 'node:fs';
import { withDefaults } from '../../src/sheet/defaults.js';
import { ruleContext, type RuleContext } from '../../src/sheet/rules/rule.js';
import type { Sheet } from '../../src/sheet/sheet-types.js';

const TEXT = readFileSync(new URL('../../examples/tray-cart/tray-cart.json', import.meta.url), 'utf8');

/** New values by JSON pointer; `undefined` removes the key. */
export type Changes = Readonly<Record<string, unknown>>;

/** The demo sheet with some values changed; need not be a sheet any more. */
export function changedSheet(changes: Changes = {}): Sheet {
  const sheet: unknown = JSON.parse(TEXT);
  for (const [pointer, value] of Object.entries(changes)) {
    const keys = pointer.split('/').slice(1);
    const last = keys.pop() ?? '';
    let place = sheet as Record<string, unknown>;
    for (const key of keys) place = place[key] as Record<string, unknown>;
    if (value === undefined) Reflect.deleteProperty(place, last);
    else place[last] = value;
  }
  return sheet as Sheet;
}

/** What a rule sees of the demo sheet with some values changed. */
export function changedContext(changes: Changes): RuleContext {
  const sheet = changedSheet(changes);
  return ruleContext(withDefaults(sheet), sheet);
}
