/** What is known at some point of the questionnaire: answers first, then the sheet at hand, then the schema's defaults. */
import type { BoardFacts, BoardId } from '../vehicle/board-facts.js';
import { BOARDS } from '../vehicle/boards.js';
import { type SensorKind, usualKinds } from '../sheet/sensor-kinds.js';
import { evenPositions } from '../vehicle/sensor-bar.js';
import { type Json, type JsonObject, valueAt } from './json-tree.js';
import { nodeAt } from './schema-node.js';

/**
 * Answers by question: a JSON pointer into the sheet, or a name with "#" in front for what the sheet holds in
 * another form (`#row`, `#standby`, `#pins`). Values are in the sheet's units.
 */
export type Answers = Readonly<Record<string, Json>>;

/** Pointers of the sensors' readings. */
export const IS_READING = /^\/sensors\/calibration\/(ground|line)$/;

function boardOf(id: Json | undefined): BoardFacts | undefined {
  return typeof id === 'string' && Object.hasOwn(BOARDS, id) ? BOARDS[id as BoardId] : undefined;
}

export class Facts {
  constructor(
    /** The sheet that the questionnaire began with; empty for a new one. */
    readonly base: JsonObject,
    readonly answers: Answers,
  ) {}

  /** Answer or value of the sheet at hand, if there is one. */
  given(pointer: string): Json | undefined {
    if (Object.hasOwn(this.answers, pointer)) return this.answers[pointer];
    if (pointer.startsWith('#') || (IS_READING.test(pointer) && this.isOtherConverter)) return undefined;
    return valueAt(this.base, pointer);
  }

  get(pointer: string): Json | undefined {
    return this.given(pointer) ?? (pointer.startsWith('#') ? undefined : nodeAt(pointer).default);
  }

  /** A number in the sheet's unit; NaN where there is none. */
  number(pointer: string): number {
    const value = this.get(pointer);
    return typeof value === 'number' ? value : NaN;
  }

  text(pointer: string): string {
    const value = this.get(pointer);
    return typeof value === 'string' ? value : '';
  }

  get board(): BoardFacts {
    return boardOf(this.get('/target/board')) ?? BOARDS.uno;
  }

  /** Whether the sheet at hand is for a board that counts differently; its readings then mean nothing. */
  private get isOtherConverter(): boolean {
    const before = boardOf(valueAt(this.base, '/target/board'));
    return before !== undefined && before.adcMaxCount !== this.board.adcMaxCount;
  }

  get sensorKind(): 'analog' | 'digital' | 'mixed' {
    const kind = this.text('/sensors/kind');
    return kind === 'digital' || kind === 'mixed' ? kind : 'analog';
  }

  /** Kind of each sensor; a mixed bar, until it is told, is a usual one. */
  get kinds(): SensorKind[] {
    const { sensorKind, count } = this;
    if (sensorKind !== 'mixed') return new Array<SensorKind>(count).fill(sensorKind);
    const listed = this.given('/sensors/kinds');
    if (!Array.isArray(listed) || listed.length !== count) return usualKinds(count);
    return listed.map((kind) => (kind === 'digital' ? 'digital' : 'analog'));
  }

  /** Number of sensors with readings to calibrate. */
  get analogCount(): number {
    return this.kinds.filter((kind) => kind === 'analog').length;
  }

  get stored(): boolean {
    return this.sensorKind !== 'digital' && this.text('/sensors/calibration/mode') === 'stored';
  }

  /** Number of sensors; the usual one while an impossible one is given. */
  get count(): number {
    const { minimum = 2, maximum = 16, default: usual } = nodeAt('/sensors/count');
    const count = this.number('/sensors/count');
    return Number.isInteger(count) && count >= minimum && count <= maximum ? count : Number(usual);
  }

  /** Whether the row of sensors is evenly spaced or described sensor by sensor. */
  get row(): 'even' | 'uneven' {
    const answer = this.answers['#row'];
    if (answer === 'even' || answer === 'uneven') return answer;
    return valueAt(this.base, '/sensors/positionsMm') === undefined ? 'even' : 'uneven';
  }

  /** Positions of the sensors in mm left of the centre line, leftmost first. */
  get positionsMm(): number[] {
    const listed = this.given('/sensors/positionsMm');
    if (this.row === 'uneven' && Array.isArray(listed) && listed.length === this.count) {
      return listed.map(Number);
    }
    return evenPositions(this.count, this.number('/sensors/pitchMm'));
  }
}
