import type { BoardFacts, PinFacts } from '../../vehicle/board-facts.js';
import { listPins } from '../../vehicle/boards.js';
import { timerHz } from '../../vehicle/pwm-modes.js';
import type { Problem } from '../problem.js';
import { khzToHz } from '../units.js';
import { joinAnd, withUnit } from '../words.js';
import type { SheetRule } from './rule.js';

/** Ratio of PWM frequencies under which motors answer alike. Common practice. */
const ALIKE = 1.05;

export const rule: SheetRule = {
  name: 'pwm-timers',
  level: 'note',
  why: 'On boards whose timers are fixed to pins, the timer decides the PWM frequency, and one of them also keeps the time.',
  check({ sheet, board, uses }) {
    if (board.timers === undefined) return [];
    const outputs = uses.flatMap(({ pointer, pin, role }) =>
      role === 'PWM output' && pin?.pwm ? [{ pointer, label: pin.label, timer: pin.pwm.timer }] : [],
    );
    const serving = new Set(outputs.map(({ timer }) => timer));
    const demand = { board, serving, maxPwmHz: khzToHz(sheet.drive.driver.maxPwmKhz) };
    const hzOf = (timer: number) => timerHz(demand, timer);
    const first = outputs[0];
    if (first === undefined) return [];
    const notes: Problem[] = [];
    const onClock = outputs.filter(({ timer }) => timer === board.clockTimer);
    if (onClock[0]) {
      const labels = joinAnd(onClock.map(({ label }) => label));
      const message = `PWM on ${labels} comes from timer ${onClock[0].timer}, which also drives the millisecond clock: its frequency stays at ${withUnit(hzOf(onClock[0].timer), 'Hz')}.`;
      notes.push({
        pointer: onClock[0].pointer,
        message,
        fix: 'Leave it so if the whine does not matter; never retime it.',
      });
    }
    const timers = [...serving].sort();
    const frequencies = timers.map(hzOf);
    const differ = Math.max(...frequencies) > ALIKE * Math.min(...frequencies);
    // Four PWM pins need two timers; they then only have to agree in frequency.
    const needsTwo = sheet.drive.driver.scheme === 'dual-pwm';
    if (timers.length > 1 && (differ || !needsTwo)) {
      const each = timers.map((timer) => `timer ${timer} (${withUnit(hzOf(timer), 'Hz')})`);
      const message = `The motors' PWM comes from ${joinAnd(each)}, so the two wheels may answer a little differently.`;
      const fix = needsTwo
        ? `Take pins of equal frequency: ${listPins(board.pins.filter((pin) => isOffClock(pin, board)))}.`
        : `Put both motors on one timer, such as that of pins ${pinsOfOneTimer(board)}.`;
      notes.push({ pointer: '/drive/driver', message, fix });
    }
    return notes;
  },
};

function isOffClock(pin: PinFacts, board: BoardFacts): boolean {
  return pin.pwm !== undefined && pin.pwm.timer !== board.clockTimer;
}

/** The lowest timer that does not keep the time, by its pins. */
function pinsOfOneTimer(board: BoardFacts): string {
  const pins = board.pins.filter((pin) => isOffClock(pin, board));
  const timer = Math.min(...pins.flatMap((pin) => pin.pwm?.timer ?? []));
  return listPins(pins.filter((pin) => pin.pwm?.timer === timer));
}
