/** All boards, and looking up a pin by whatever a person calls it. */
import type { BoardFacts, BoardId, PinFacts } from './board-facts.js';
import { esp32 } from './boards/esp32.js';
import { leonardo } from './boards/leonardo.js';
import { mega2560 } from './boards/mega2560.js';
import { nano } from './boards/nano.js';
import { pico } from './boards/pico.js';
import { uno } from './boards/uno.js';

/** Which pins can count edges: those of the ports with a pin change interrupt; in MicroPython every input. */
function withEdges(board: BoardFacts): BoardFacts {
  const counts = ({ input, port }: PinFacts): boolean =>
    input && (board.language === 'micropython' || board.pinChange?.[port?.name ?? ''] !== undefined);
  return { ...board, pins: board.pins.map((pin) => ({ ...pin, changeInterrupt: counts(pin) })) };
}

export const BOARDS: Readonly<Record<BoardId, BoardFacts>> = {
  uno: withEdges(uno),
  nano: withEdges(nano),
  mega2560: withEdges(mega2560),
  leonardo: withEdges(leonardo),
  pico: withEdges(pico),
  esp32: withEdges(esp32),
};

/** All ids, in the order in which the questionnaire offers them. */
export const BOARD_IDS = Object.keys(BOARDS) as readonly BoardId[];

/**
 * The pin with this label or alias, in any case: 5, "5", "D5", "a0", "GP26", "IO32"; undefined if the board has none.
 */
export function findPin(board: BoardFacts, label: number | string): PinFacts | undefined {
  const wanted = String(label).toUpperCase();
  return board.pins.find((pin) => pin.label === wanted || pin.aliases.includes(wanted));
}

/** How a sheet writes a pin: the bare number where the board prints one, else the label. */
export function sheetLabel(pin: PinFacts): number | string {
  return /^\d+$/.test(pin.label) ? Number(pin.label) : pin.label;
}

/** Pin labels for a message, runs shortened: "2 to 6, 9, A0 to A5". */
export function listPins(pins: readonly PinFacts[]): string {
  const runs: PinFacts[][] = [];
  for (const pin of pins) {
    const run = runs.at(-1);
    const last = run?.at(-1);
    if (run && last && follows(last.label, pin.label)) run.push(pin);
    else runs.push([pin]);
  }
  const parts = runs.flatMap((run) => {
    const labels = run.map((pin) => pin.label);
    return labels.length > 2 ? [`${labels[0]} to ${labels.at(-1)}`] : labels;
  });
  return parts.join(', ');
}

function follows(before: string, after: string): boolean {
  const split = (label: string): [string, number] => {
    const prefix = label.replace(/\d+$/, '');
    return [prefix, Number(label.slice(prefix.length))];
  };
  const [prefixBefore, numberBefore] = split(before);
  const [prefixAfter, numberAfter] = split(after);
  return prefixBefore === prefixAfter && numberAfter === numberBefore + 1;
}
