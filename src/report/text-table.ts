/** Columns of text, as wide as their widest cell; columns of numbers are set flush right. */

const GAP = '  ';
const NUMBER = /^-?[\d.]+$/;

/** Lines of a table; every row has the same number of cells. */
export function table(rows: readonly (readonly string[])[]): string {
  const columns = rows[0]?.length ?? 0;
  const widths = Array.from({ length: columns }, (_, i) =>
    Math.max(...rows.map((row) => row[i]?.length ?? 0)),
  );
  const flushRight = widths.map(
    (_, i) => rows.slice(1).every((row) => NUMBER.test(row[i] ?? '')) && rows.length > 1,
  );
  const line = (row: readonly string[]) =>
    row
      .map((cell, i) => (flushRight[i] ? cell.padStart(widths[i] ?? 0) : cell.padEnd(widths[i] ?? 0)))
      .join(GAP)
      .trimEnd();
  return rows.map(line).join('\n');
}
