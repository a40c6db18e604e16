/** Breaks text into lines at words; the terminal would break within them. */

/** Narrower than this nobody reads; wider lines are hard to follow. */
const MIN_COLUMNS = 20;
const MAX_COLUMNS = 100;

/**
 * Lines of at most `columns` characters, each with the indent in front; from the second line on with `hang` more
 * blanks. A word longer than a line stands alone.
 */
export function wrap(text: string, columns: number, indent = 0, hang = 0): string[] {
  const width = Math.min(Math.max(columns, MIN_COLUMNS), MAX_COLUMNS) - 1;
  const lines: string[] = [];
  let line = ' '.repeat(indent);
  let empty = true;
  for (const word of text.split(/\s+/).filter(Boolean)) {
    if (!empty && line.length + 1 + word.length > width) {
      lines.push(line);
      line = ' '.repeat(indent + hang);
      empty = true;
    }
    line += empty ? word : ` ${word}`;
    empty = false;
  }
  return empty ? lines : [...lines, line];
}

/** The same as one text. */
export function wrapped(text: string, columns: number, indent = 0, hang = 0): string {
  return wrap(text, columns, indent, hang).join('\n');
}
