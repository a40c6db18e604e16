/** One row of the rule table: the state's number, the bar with its spots to scale, the wheels' arrows, and the kind. */
import type { RuleRow } from '../../design/design.js';
import { mToMm } from '../../sheet/units.js';
import type { Vehicle } from '../../vehicle/vehicle.js';
import { INK, SHADE, WORDS } from '../svg-document.js';
import { coordinate, element, textAt } from '../svg-text.js';
import { DOTTED, THIN, strokeOf, type LineStyle } from './line-style.js';

export const ROW_PX = 32;
/** Space between the parts of a row, px. */
const GAP = 12;
/** Widths of the parts, px; those of bar and arrows share what is left. */
const VALUE_PX = 44;
const KIND_PX = 128;
const BAR_SHARE = 0.52;
const ARROW: LineStyle = { width: 2.2, dashes: '' };
const HEAD_PX = 7;

/** Places and scales of the parts of all rows in a column. */
export interface RowLayout {
  stateRight: number;
  barMiddle: number;
  barWidth: number;
  /** px per m of the bar */
  perM: number;
  /** Place of wheel speed 0, and px per base speed. */
  zero: number;
  perBase: number;
  valueRight: number;
  kindLeft: number;
}

/**
 * @param left px
 * @param width px
 * @param rows all the rows of the table, so that columns share their scales
 */
export function rowLayout(
  vehicle: Vehicle,
  rows: readonly RuleRow[],
  left: number,
  width: number,
): RowLayout {
  const { positionsM, spotRadiusM } = vehicle.bar;
  const statePx = 8 * Math.max(...rows.map(({ state }) => String(state).length));
  const free = width - statePx - VALUE_PX - KIND_PX - 4 * GAP;
  const barWidth = BAR_SHARE * free;
  const spanM = positionsM[0]! - positionsM[positionsM.length - 1]! + 4 * spotRadiusM;
  const fractions = rows.flatMap((row) => [row.left, row.right]);
  const [least, most] = [Math.min(0, ...fractions), Math.max(1, ...fractions)];
  const arrowLeft = left + statePx + barWidth + 2 * GAP;
  const perBase = (free - barWidth) / (most - least);
  return {
    stateRight: left + statePx,
    barMiddle: left + statePx + GAP + barWidth / 2,
    barWidth,
    perM: barWidth / spanM,
    zero: arrowLeft - least * perBase,
    perBase,
    valueRight: left + width - KIND_PX - GAP,
    kindLeft: left + width - KIND_PX,
  };
}

/** A number with its sign as it is written in print. */
function signed(value: number, digits: number): string {
  const text = value.toFixed(digits);
  return Number(text) === 0 ? (0).toFixed(digits) : text.replace('-', '\u2212');
}

export function kindWords({ kind, fromM, toM }: RuleRow): string {
  if (fromM === undefined || toM === undefined) return kind;
  return `${kind} ${signed(mToMm(fromM), 1)} to ${signed(mToMm(toM), 1)}`;
}

/** @param y upper edge of the row, px */
export function ruleRow(vehicle: Vehicle, row: RuleRow, layout: RowLayout, y: number): string {
  const middle = y + ROW_PX / 2;
  const parts = [
    textAt(layout.stateRight, middle + 4.5, String(row.state), { 'text-anchor': 'end', fill: WORDS }),
    barSvg(vehicle, row, layout, middle),
    wheelSvg(row.left, layout, middle - 7, 'left'),
    wheelSvg(row.right, layout, middle + 7, 'right'),
    textAt(layout.kindLeft, middle + 4.5, kindWords(row), { fill: WORDS }),
  ];
  return element('g', { class: 'rule' }, `\n${parts.join('\n')}\n`);
}

/** The bar as seen from above in driving direction: positive positions to the left. */
function barSvg({ bar, line }: Vehicle, row: RuleRow, layout: RowLayout, y: number): string {
  const { barMiddle, barWidth, perM } = layout;
  const [left, height] = [barMiddle - barWidth / 2, ROW_PX - 8];
  const parts: string[] = [];
  if (row.fromM !== undefined && row.toM !== undefined) {
    const centre = barMiddle - ((row.fromM + row.toM) / 2) * perM;
    const from = Math.max(left, centre - (line.widthM / 2) * perM);
    const to = Math.min(left + barWidth, centre + (line.widthM / 2) * perM);
    parts.push(element('rect', { x: from, y: y - height / 2, width: to - from, height, fill: SHADE }));
  }
  parts.push(
    element('rect', { x: left, y: y - height / 2, width: barWidth, height, fill: 'none', stroke: WORDS }),
  );
  const count = bar.positionsM.length;
  const r = Math.max(1.5, bar.spotRadiusM * perM);
  bar.positionsM.forEach((positionM, i) => {
    const isOn = Math.floor(row.state / 2 ** (count - 1 - i)) % 2 === 1;
    parts.push(
      element('circle', {
        class: isOn ? 'on' : 'off',
        cx: barMiddle - positionM * perM,
        cy: y,
        r: Math.min(r, height / 2 - 1),
        fill: isOn ? INK : '#ffffff',
        stroke: INK,
        'stroke-width': 1.2,
      }),
    );
  });
  return parts.join('\n');
}

/** An arrow as long as the wheel's fraction of base speed, to the right for forward, and the number. */
function wheelSvg(
  fraction: number,
  { zero, perBase, valueRight }: RowLayout,
  y: number,
  wheel: string,
): string {
  const tip = zero + fraction * perBase;
  const length = Math.abs(tip - zero);
  const back = Math.sign(fraction) * Math.min(HEAD_PX, length);
  const at = coordinate;
  const shaft = `M${at(zero)} ${at(y)}H${at(tip - back)}`;
  const head = `M${at(tip)} ${at(y)}L${at(tip - back)} ${at(y - 4)}V${at(y + 4)}Z`;
  const arrow =
    length < 0.5
      ? element('circle', { class: `wheel ${wheel}`, cx: zero, cy: y, r: 2, fill: INK })
      : `${element('path', { d: shaft, ...strokeOf(ARROW), class: `wheel ${wheel}` })}\n${element('path', { d: head, fill: INK })}`;
  return `${arrow}\n${textAt(valueRight, y + 4, signed(fraction, 2), { 'text-anchor': 'end', fill: WORDS, 'font-size': '12' })}`;
}

/** Head of a column and, behind its rows, the lines of standing still and of base speed. */
export function columnHead(layout: RowLayout, y: number, height: number): string {
  const { barMiddle, zero, perBase, kindLeft } = layout;
  const base = zero + perBase;
  const word = (x: number, text: string, anchor: string) =>
    textAt(x, y - 22, text, { 'text-anchor': anchor, fill: WORDS, 'font-weight': 'bold' });
  const mark = (x: number, text: string) => textAt(x, y - 5, text, { 'text-anchor': 'middle', fill: WORDS });
  const upright = (x: number) => `M${coordinate(x)} ${coordinate(y)}v${coordinate(height)}`;
  return [
    word(barMiddle, 'bar', 'middle'),
    word((zero + base) / 2, 'wheels', 'middle'),
    word(kindLeft, 'kind, offset', 'start'),
    mark(zero, '0'),
    mark(base, '1'),
    mark(barMiddle, 'left \u2013 right'),
    element('path', { d: upright(zero), ...strokeOf({ ...THIN, width: 0.8 }, WORDS) }),
    element('path', { d: upright(base), ...strokeOf({ ...DOTTED, width: 1 }, WORDS) }),
  ].join('\n');
}
