/** PWM of a vehicle's motors: which timers serve them, in which mode. */
import type { BoardFacts, PwmMode, TimerFacts } from './board-facts.js';
import type { Vehicle } from './vehicle.js';

/** Timers that serve the motors, of boards whose timers are fixed to pins. */
export function motorTimers({ drive }: Vehicle): Set<number> {
  const pins = [drive.left, drive.right].flatMap(({ pwm, in1, in2 }) => (pwm ? [pwm] : [in1, in2]));
  return new Set(pins.flatMap((pin) => pin?.pwm?.timer ?? []));
}

/** Mode of a timer among those that serve the motors. */
export function modeOf(facts: TimerFacts, serving: ReadonlySet<number>): PwmMode {
  return (serving.size === 1 && facts.pwmAlone) || facts.pwm;
}

/** PWM frequency of one timer of a vehicle's board, Hz. */
export function timerHz(board: BoardFacts, timer: number, serving: ReadonlySet<number>): number {
  const facts = board.timers?.find((each) => each.timer === timer);
  return facts ? modeOf(facts, serving).pwmHz : (board.timerPwmHz?.[timer] ?? board.pwmHz);
}

/** PWM frequency of the motors, the lowest where they differ, Hz. */
export function motorPwmHz(vehicle: Vehicle): number {
  const { board } = vehicle;
  if (board.timerPwmHz === undefined) return board.pwmHz;
  const serving = motorTimers(vehicle);
  return Math.min(...[...serving].map((timer) => timerHz(board, timer, serving)));
}
