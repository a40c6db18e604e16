/**
 * Places for words beside curves: where they cover neither a curve nor other words.
 *
 * Each label is tried around each of its anchors; the place that covers least is taken, the first one where several are as good.
 */
import { HALO, WORDS } from '../svg-document.js';
import { textAt } from '../svg-text.js';
import { THIN, line, strokeOf, type LineStyle } from './line-style.js';
import { filled, type Box, type Point } from './polyline.js';

/** Width of a character, as a share of the font size: wide enough for the widest of the fonts that are asked for. */
const CHARACTER_SHARE = 0.6;

/** Width that a text takes at most, px. */
export function textWidth(text: string, fontSize: number): number {
  return text.length * fontSize * CHARACTER_SHARE;
}

/** Directions from the anchor, the preferred ones first; y downward. */
const DIRECTIONS: readonly Point[] = [
  [1, -1],
  [1, 1],
  [-1, -1],
  [-1, 1],
  [1, 0],
  [-1, 0],
  [0, -1],
  [0, 1],
];
const DISTANCES_PX = [7, 14, 24];
const LEADER: LineStyle = { ...THIN, width: 0.8 };
const STEP_PX = 3;
/** Weight of a point of a curve under a label or its leader, and of another label. */
const COVERED_POINT = 1;
const COVERED_LABEL = 1000;
/** Points this near to the anchor belong to the curve that is named, px. */
const OWN_PX = 6;

function overlap(a: Box, b: Box): boolean {
  return a.x < b.x + b.width && b.x < a.x + a.width && a.y < b.y + b.height && b.y < a.y + a.height;
}

function contains({ x, y, width, height }: Box, [px, py]: Point): boolean {
  return px > x - 2 && px < x + width + 2 && py > y - 2 && py < y + height + 2;
}

export class LabelPlacer {
  private readonly points: Point[] = [];
  private readonly taken: Box[] = [];

  /** @param bounds px; no label leaves them */
  constructor(
    private readonly bounds: Box,
    private readonly fontSize: number,
  ) {}

  /** Keeps labels off a line. */
  avoid(...lines: readonly (readonly Point[])[]): void {
    for (const points of lines) this.points.push(...filled(points, STEP_PX));
  }

  /**
   * A label beside the best of its anchors.
   *
   * @param anchors at least one, px; the preferred ones first
   * @param leader whether a line leads from the label to its anchor
   */
  place(text: string, anchors: readonly Point[], leader = false): string {
    const width = textWidth(text, this.fontSize);
    const height = this.fontSize;
    let best: Place | undefined;
    for (const anchor of anchors) {
      for (const distance of DISTANCES_PX) {
        for (const direction of DIRECTIONS) {
          const box = this.held(
            boxBeside(anchor, direction, leader ? 2 * distance : distance, width, height),
          );
          const cost = this.cost(box) + (leader ? this.leaderCost(anchor, box) : 0);
          if (best === undefined || cost < best.cost) best = { anchor, box, cost };
        }
      }
      if (best?.cost === 0) break;
    }
    if (best === undefined) throw new RangeError('A label needs an anchor.');
    const { anchor, box } = best;
    this.taken.push(box);
    const words = textAt(box.x + width / 2, box.y + height - 2.5, text, { ...HALO, 'text-anchor': 'middle' });
    if (!leader) return words;
    const led = leaderLine(anchor, box);
    this.avoid(led);
    return `${line([led], LEADER, strokeOf(LEADER, WORDS))}\n${words}`;
  }

  /** The box, moved into the bounds. */
  private held(box: Box): Box {
    const { bounds } = this;
    const x = Math.max(bounds.x + 4, Math.min(bounds.x + bounds.width - box.width - 4, box.x));
    const y = Math.max(bounds.y + 4, Math.min(bounds.y + bounds.height - box.height - 4, box.y));
    return { ...box, x, y };
  }

  private cost(box: Box): number {
    const points = this.points.filter((point) => contains(box, point)).length;
    const labels = this.taken.filter((other) => overlap(box, other)).length;
    return points * COVERED_POINT + labels * COVERED_LABEL;
  }

  /** How much of other lines and labels a leader passes. */
  private leaderCost(anchor: Point, box: Box): number {
    const along = filled(leaderLine(anchor, box), STEP_PX);
    const far = along.filter(([x, y]) => Math.hypot(x - anchor[0], y - anchor[1]) > OWN_PX);
    const isNear = ([x, y]: Point) => this.points.some(([px, py]) => Math.hypot(px - x, py - y) < STEP_PX);
    const crossed = along.filter((point) => this.taken.some((other) => contains(other, point)));
    return far.filter(isNear).length * COVERED_POINT + crossed.length * COVERED_LABEL;
  }
}

interface Place {
  anchor: Point;
  box: Box;
  cost: number;
}

/** From an anchor to the nearest edge of a label. */
function leaderLine([ax, ay]: Point, box: Box): Point[] {
  const x = Math.max(box.x, Math.min(box.x + box.width, ax));
  const y = Math.max(box.y, Math.min(box.y + box.height, ay));
  return [
    [ax, ay],
    [x, y],
  ];
}

function boxBeside([ax, ay]: Point, [dx, dy]: Point, distance: number, width: number, height: number): Box {
  const reach = dx !== 0 && dy !== 0 ? distance * Math.SQRT1_2 : distance;
  const x = ax + dx * reach + ((dx - 1) / 2) * width;
  const y = ay + dy * reach + ((dy - 1) / 2) * height;
  return { x, y, width, height };
}
