/**
 * A uniform grid over the floor that tells which strips come near a point.
 *
 * Strips are given as points along them, close together; a strip is listed in every cell that a disc of the given reach around
 * one of its points touches. Cells are about 50 mm wide, wider for large lanes, so that there are at most a million of them.
 * The lists lie one behind the other in one array (compressed sparse rows): cell c owns items[starts[c]] to items[starts[c+1] - 1].
 */

const CELL_M = 0.05;
const MOST_CELLS = 1e6;

export interface Grid {
  readonly left: number;
  readonly bottom: number;
  /** Cells per metre. */
  readonly perM: number;
  readonly columns: number;
  readonly rows: number;
  readonly starts: Int32Array;
  readonly items: Int32Array;
}

/**
 * @param strips for each strip its points as x0, y0, x1, y1, ... in m
 * @param reachM how far from its points a strip can be felt, half the distance between two points included, m
 */
export function makeGrid(strips: readonly Float64Array[], reachM: number): Grid {
  let [left, right, bottom, top] = [Infinity, -Infinity, Infinity, -Infinity];
  for (const points of strips) {
    for (let i = 0; i + 1 < points.length; i += 2) {
      left = Math.min(left, points[i]!);
      right = Math.max(right, points[i]!);
      bottom = Math.min(bottom, points[i + 1]!);
      top = Math.max(top, points[i + 1]!);
    }
  }
  if (left === Infinity) [left, right, bottom, top] = [0, 0, 0, 0];
  left -= reachM;
  bottom -= reachM;
  const widthM = right + reachM - left;
  const heightM = top + reachM - bottom;
  const cellM = Math.max(
    CELL_M,
    Math.sqrt((widthM * heightM) / MOST_CELLS),
    Math.max(widthM, heightM) / MOST_CELLS,
  );
  const columns = Math.ceil(widthM / cellM) + 1;
  const rows = Math.ceil(heightM / cellM) + 1;
  const shape = { left, bottom, perM: 1 / cellM, columns, rows };

  const starts = new Int32Array(columns * rows + 1);
  visitCells(strips, reachM, shape, (cell) => starts[cell + 1]!++);
  for (let cell = 0; cell < columns * rows; cell++) starts[cell + 1]! += starts[cell]!;
  const items = new Int32Array(starts[columns * rows]!);
  const next = starts.slice();
  visitCells(strips, reachM, shape, (cell, strip) => (items[next[cell]!++] = strip));
  return { ...shape, starts, items };
}

/** Calls once for each pair of a cell and a strip that reaches into it, strip by strip. */
function visitCells(
  strips: readonly Float64Array[],
  reachM: number,
  grid: Pick<Grid, 'left' | 'bottom' | 'perM' | 'columns' | 'rows'>,
  visit: (cell: number, strip: number) => void,
): void {
  const latest = new Int32Array(grid.columns * grid.rows).fill(-1);
  const cellM = 1 / grid.perM;
  strips.forEach((points, strip) => {
    for (let i = 0; i + 1 < points.length; i += 2) {
      const x = points[i]! - grid.left;
      const y = points[i + 1]! - grid.bottom;
      const lastRow = Math.min(grid.rows - 1, Math.floor((y + reachM) * grid.perM));
      const lastColumn = Math.min(grid.columns - 1, Math.floor((x + reachM) * grid.perM));
      for (let row = Math.max(0, Math.floor((y - reachM) * grid.perM)); row <= lastRow; row++) {
        const dy = outside(y, row * cellM, cellM);
        for (let column = Math.max(0, Math.floor((x - reachM) * grid.perM)); column <= lastColumn; column++) {
          const dx = outside(x, column * cellM, cellM);
          const cell = row * grid.columns + column;
          if (latest[cell] === strip || dx * dx + dy * dy > reachM * reachM) continue;
          latest[cell] = strip;
          visit(cell, strip);
        }
      }
    }
  });
}

/** How far a value lies outside an interval. */
function outside(value: number, start: number, length: number): number {
  return Math.max(0, start - value, value - start - length);
}
