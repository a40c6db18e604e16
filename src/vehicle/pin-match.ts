/**
 * Finds a pin for everything that needs one.
 *
 * Each need is matched with a pin that can do it by augmenting paths (Kuhn's method for bipartite matching), which finds an
 * assignment whenever there is one. It is tried with ever more permissive sets of pins: first without pins that need
 * watching and with all PWM from one timer that does not keep the time; the assignment with the least to watch is taken.
 */
import type { BoardFacts, PinFacts } from './board-facts.js';
import { cautionsOf, isAble, sharedOutput, type PinRole } from './pin-roles.js';

/** One thing that needs a pin. */
export interface Need {
  key: string;
  role: PinRole;
}

/** Pins by the key of the need that they serve. */
export type Assignment = ReadonlyMap<string, PinFacts>;

/** A pin's own caution weighs more than one of its converter, which only a radio brings to bear. */
function cautionWeight(pin: PinFacts, role: PinRole): number {
  return cautionsOf(pin, role).length + (pin.caution === undefined ? 0 : 1);
}

const CAUTION_LEVELS = [0, 1, Infinity];

/** The assignment with the least to watch; undefined if the board has too few pins of some kind. */
export function bestAssignment(board: BoardFacts, needs: readonly Need[]): Assignment | undefined {
  let best: Assignment | undefined;
  let leastCost = Infinity;
  for (const level of CAUTION_LEVELS) {
    for (const pwmPins of pwmGroups(board)) {
      const found = match(board, needs, pwmPins, level);
      const cost = found ? costOf(board, needs, found) : Infinity;
      if (cost < leastCost) {
        best = found;
        leastCost = cost;
      }
    }
  }
  return best;
}

/** Sets of pins for the motors' PWM, best first; no two pins of a set carry the same output. */
function pwmGroups(board: BoardFacts): PinFacts[][] {
  const usable = board.pins.filter((pin) => pin.pwm !== undefined && pin.reserved === undefined);
  const distinct = usable.filter((pin, index) => {
    const output = sharedOutput(pin);
    return output === undefined || usable.findIndex((other) => sharedOutput(other) === output) === index;
  });
  if (board.timerPwmHz === undefined) return [distinct];
  const timers = [...new Set(distinct.map((pin) => pin.pwm?.timer))].sort();
  const offClock = distinct.filter((pin) => pin.pwm?.timer !== board.clockTimer);
  const single = timers.map((timer) => distinct.filter((pin) => pin.pwm?.timer === timer));
  return [...single, offClock, distinct];
}

/** What there is to watch in a plan: cautions of pins, PWM from the clock's timer, PWM from several timers. */
function costOf(board: BoardFacts, needs: readonly Need[], assignment: Assignment): number {
  const timers = new Set<number>();
  let cost = 0;
  for (const { key, role } of needs) {
    const pin = assignment.get(key);
    if (pin === undefined) continue;
    cost += cautionWeight(pin, role);
    if (role === 'PWM output' && pin.pwm) timers.add(pin.pwm.timer);
  }
  if (board.timerPwmHz === undefined) return cost;
  const onClock = board.clockTimer !== undefined && timers.has(board.clockTimer);
  // The earlier of two equal plans stays, so the group order decides the rest.
  return cost + (onClock ? 1 : 0) + timers.size;
}

/** Gives each need a pin of its own, or undefined if that cannot be. */
function match(
  board: BoardFacts,
  needs: readonly Need[],
  pwmPins: readonly PinFacts[],
  cautionLevel: number,
): Assignment | undefined {
  const takenBy = new Map<PinFacts, Need>();
  const fitting = new Map<PinRole, readonly PinFacts[]>();
  const place = (need: Need, tried: Set<PinFacts>): boolean => {
    const pins = fitting.get(need.role) ?? candidates(board, need.role, pwmPins, cautionLevel);
    fitting.set(need.role, pins);
    const free = pins.find((pin) => !takenBy.has(pin));
    // Only where no pin is free, others have to move.
    const pin = free ?? pins.find((taken) => canMove(taken, tried));
    if (pin !== undefined) takenBy.set(pin, need);
    return pin !== undefined;
  };
  const canMove = (pin: PinFacts, tried: Set<PinFacts>): boolean => {
    const holder = takenBy.get(pin);
    if (holder === undefined || tried.has(pin)) return false;
    tried.add(pin);
    return place(holder, tried);
  };
  if (!needs.every((need) => place(need, new Set()))) return undefined;
  return new Map([...takenBy].map(([pin, need]) => [need.key, pin]));
}

/** Pins for a role: least to watch first, then those that could do least else, then in the board's order. */
function candidates(
  board: BoardFacts,
  role: PinRole,
  pwmPins: readonly PinFacts[],
  cautionLevel: number,
): PinFacts[] {
  const skills = (pin: PinFacts): number =>
    [pin.output, pin.pwm, pin.adc, pin.interrupt].filter(Boolean).length;
  return board.pins
    .filter((pin) => pin.reserved === undefined && isAble(pin, role))
    .filter((pin) => role !== 'PWM output' || pwmPins.includes(pin))
    .filter((pin) => cautionWeight(pin, role) <= cautionLevel)
    .sort((a, b) => cautionWeight(a, role) - cautionWeight(b, role) || skills(a) - skills(b));
}
