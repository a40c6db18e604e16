/**
 * A picture of dots in text: braille patterns of 2 by 4 dots a character (Unicode block U+2800), or in plain ASCII one by two.
 *
 * A character cell being about twice as high as wide, dots are about square in both. Dots count from the top left corner.
 */

/** Bit of each dot in a braille character, by row and column (Unicode Standard, Braille Patterns). */
const BRAILLE_BITS = [
  [0x01, 0x08],
  [0x02, 0x10],
  [0x04, 0x20],
  [0x40, 0x80],
] as const;
const BRAILLE_BLANK = 0x2800;
/** No dot, the upper, the lower, both. */
const ASCII = [' ', "'", '.', ':'] as const;

export class DotCanvas {
  /** Dots across and down. */
  readonly width: number;
  readonly height: number;
  private readonly cellWidth: number;
  private readonly cellHeight: number;
  private readonly bits: Uint8Array;
  private readonly marks = new Map<number, string>();

  /** @param unicode braille, else ASCII */
  constructor(
    private readonly columns: number,
    private readonly rows: number,
    private readonly unicode: boolean,
  ) {
    [this.cellWidth, this.cellHeight] = unicode ? [2, 4] : [1, 2];
    this.width = columns * this.cellWidth;
    this.height = rows * this.cellHeight;
    this.bits = new Uint8Array(columns * rows);
  }

  /** Sets a dot; outside the picture nothing happens. */
  dot(x: number, y: number): void {
    const [column, row] = [Math.round(x), Math.round(y)];
    const cell = this.cellAt(column, row);
    if (cell === undefined) return;
    const [inColumn, inRow] = [column % this.cellWidth, row % this.cellHeight];
    this.bits[cell]! |= this.unicode ? (BRAILLE_BITS[inRow]?.[inColumn] ?? 0) : 1 << inRow;
  }

  /** Sets the dots along a straight line. */
  line(x0: number, y0: number, x1: number, y1: number): void {
    const steps = Math.max(1, Math.ceil(Math.max(Math.abs(x1 - x0), Math.abs(y1 - y0))));
    for (let i = 0; i <= steps; i++) this.dot(x0 + ((x1 - x0) * i) / steps, y0 + ((y1 - y0) * i) / steps);
  }

  /** Puts a character over the dots. */
  mark(x: number, y: number, character: string): void {
    const cell = this.cellAt(Math.round(x), Math.round(y));
    if (cell !== undefined) this.marks.set(cell, character);
  }

  /** The picture line by line, without blanks at the ends. */
  lines(): string[] {
    return Array.from({ length: this.rows }, (_, row) => {
      let line = '';
      for (let cell = row * this.columns; cell < (row + 1) * this.columns; cell++)
        line += this.character(cell);
      return line.trimEnd();
    });
  }

  private character(cell: number): string {
    const bits = this.bits[cell]!;
    const dots = this.unicode && bits > 0 ? String.fromCharCode(BRAILLE_BLANK + bits) : ASCII[bits];
    return this.marks.get(cell) ?? dots ?? ' ';
  }

  private cellAt(x: number, y: number): number | undefined {
    if (!(x >= 0 && x < this.width && y >= 0 && y < this.height)) return undefined;
    return Math.floor(y / this.cellHeight) * this.columns + Math.floor(x / this.cellWidth);
  }
}

/** Whether a locale says that the terminal takes UTF-8 (POSIX: LC_ALL before LC_CTYPE before LANG). */
export function isUtf8Locale(environment: Readonly<Record<string, string | undefined>>): boolean {
  const locale = environment['LC_ALL'] || environment['LC_CTYPE'] || environment['LANG'] || '';
  return /utf-?8/i.test(locale);
}
