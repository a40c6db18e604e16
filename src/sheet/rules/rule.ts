/**
 * What a rule is: one thing that has to hold between fields of a sheet, beyond what the schema can say of each alone.
 *
 * Rules run on sheets that fit the schema. None relies on another: where its ground is missing (a pin that is not on the board, two
 * contradictory sets of positions), it says nothing, as the rule for that says it.
 */
import type { BoardFacts, PinFacts } from '../../vehicle/board-facts.js';
import { BOARDS, findPin } from '../../vehicle/boards.js';
import { DRIVERS } from '../../vehicle/drivers.js';
import type { PinRole } from '../../vehicle/pin-roles.js';
import type { ResolvedSheet } from '../defaults.js';
import { positionsOf } from '../positions.js';
import { kindsOf } from '../sensor-kinds.js';
import type { Problem } from '../problem.js';
import type { Sheet } from '../sheet-types.js';
import { pointerTo } from '../words.js';

export interface SheetRule {
  /** Short name, as the file. */
  name: string;
  /** A problem stops the design; a note is worth knowing. */
  level: 'problem' | 'note';
  /** Why the rule is there. */
  why: string;
  /** All violations. Never throws on a sheet that fits the schema. */
  check(context: RuleContext): Problem[];
}

/** One pin that the sheet uses. */
export interface PinUse {
  pointer: string;
  /** As the sheet writes it. */
  label: number | string;
  /** The board's pin of that label, if there is one. */
  pin: PinFacts | undefined;
  role: PinRole;
  /** For messages: "sensor 3", "left pwm". */
  what: string;
}

export interface RuleContext {
  /** With every default filled in. */
  sheet: ResolvedSheet;
  /** As written. */
  given: Sheet;
  board: BoardFacts;
  /** Sensor positions, mm left of the centre line, leftmost first; undefined where the sheet contradicts itself on them. */
  positionsMm: readonly number[] | undefined;
  /** Every pin that the vehicle needs, in the sheet's order; pins that the driver scheme does not use are left out. */
  uses: readonly PinUse[];
}

export function ruleContext(sheet: ResolvedSheet, given: Sheet): RuleContext {
  const board = BOARDS[sheet.target.board];
  return { sheet, given, board, positionsMm: positionsOf(sheet), uses: pinUses(sheet, board) };
}

function pinUses(sheet: ResolvedSheet, board: BoardFacts): PinUse[] {
  const uses: PinUse[] = [];
  const add = (pointer: string, label: number | string, role: PinRole, what: string): void => {
    uses.push({ pointer, label, pin: findPin(board, label), role, what });
  };
  const kinds = kindsOf(sheet.sensors);
  sheet.sensors.pins.forEach((label, index) => {
    const role = (kinds[index] ?? sheet.sensors.kind) === 'digital' ? 'digital sensor' : 'analog sensor';
    add(pointerTo('sensors', 'pins', index), label, role, `sensor ${index + 1}`);
  });
  const { driver } = sheet.drive;
  const scheme = DRIVERS[driver.scheme];
  for (const side of ['left', 'right'] as const) {
    for (const { key, pwm } of scheme.motorPins) {
      const label = driver[side][key];
      if (label === undefined) continue;
      add(pointerTo('drive', 'driver', side, key), label, pwm ? 'PWM output' : 'output', `${side} ${key}`);
    }
  }
  if (scheme.standby && driver.standbyPin !== undefined) {
    add(pointerTo('drive', 'driver', 'standbyPin'), driver.standbyPin, 'output', 'standby');
  }
  for (const side of ['left', 'right'] as const) {
    for (const key of ['a', 'b'] as const) {
      const label = sheet.encoders?.[side][key];
      const wanted = key === 'a' || sheet.encoders?.channels === 'quadrature';
      if (label === undefined || !wanted) continue;
      add(pointerTo('encoders', side, key), label, 'encoder', `${side} encoder ${key}`);
    }
  }
  if (sheet.led !== undefined) add(pointerTo('led', 'pin'), sheet.led.pin, 'output', 'LED');
  add(pointerTo('start', 'buttonPin'), sheet.start.buttonPin, 'button', 'start button');
  if (sheet.stopPin !== undefined) add(pointerTo('stopPin'), sheet.stopPin, 'stop input', 'stop input');
  return uses;
}
