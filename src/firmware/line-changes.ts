/**
 * How many lines a change adds and removes: the lines beyond a longest common subsequence.
 *
 * Common lines at both ends are taken off first; for the rest the table of Wagner and Fischer (1974), one row at a time.
 */
export interface LineChanges {
  added: number;
  removed: number;
}

function linesOf(text: string): string[] {
  if (text === '') return [];
  return text.replace(/\n$/, '').split('\n');
}

function commonLength(before: readonly string[], after: readonly string[]): number {
  let row = new Uint32Array(after.length + 1);
  for (const line of before) {
    const next = new Uint32Array(after.length + 1);
    for (let j = 0; j < after.length; j++)
      next[j + 1] = line === after[j] ? row[j]! + 1 : Math.max(next[j]!, row[j + 1]!);
    row = next;
  }
  return row[after.length]!;
}

export function lineChanges(before: string, after: string): LineChanges {
  const old = linesOf(before);
  const now = linesOf(after);
  const most = Math.min(old.length, now.length);
  let head = 0;
  while (head < most && old[head] === now[head]) head++;
  let tail = 0;
  while (tail < most - head && old[old.length - 1 - tail] === now[now.length - 1 - tail]) tail++;
  const oldMiddle = old.slice(head, old.length - tail);
  const nowMiddle = now.slice(head, now.length - tail);
  const common = commonLength(oldMiddle, nowMiddle);
  return { added: nowMiddle.length - common, removed: oldMiddle.length - common };
}
