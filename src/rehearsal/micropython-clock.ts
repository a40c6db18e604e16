/**
 * Virtual time of the chip that the interpreter believes to run on, its tick counters and its watchdog.
 *
 * Time passes only by what the program does. The surroundings are let run up to the present before they are looked at or acted on,
 * whenever the program sleeps, and at least every millisecond. The clock starts 1 s before the 30-bit tick counter wraps, so that every run crosses a wrap.
 * Source: MicroPython documentation, time: ticks_add(), ticks_diff() and their period.
 */

const TICKS_PERIOD = 2 ** 30;
const US_BEFORE_WRAP = 1e6;
const LONGEST_BEHIND_US = 1000;

/** The chip has started anew, and would do so for ever: the rehearsal ends. */
export class ChipReset extends Error {
  override readonly name = 'ChipReset';
}

function wrapped(value: number): number {
  return ((value % TICKS_PERIOD) + TICKS_PERIOD) % TICKS_PERIOD;
}

/** The moment `change` ticks after `ticks`. */
export function ticksAdd(ticks: number, change: number): number {
  return wrapped(ticks + change);
}

/** Ticks from `start` to `end`, -2^29 to 2^29 - 1. */
export function ticksDiff(end: number, start: number): number {
  return wrapped(end - start + TICKS_PERIOD / 2) - TICKS_PERIOD / 2;
}

export class MicroPythonClock {
  /** Time since power-on, us. */
  private nowUs = 0;
  /** Time up to which the surroundings have run, us. */
  private worldUs = 0;
  private watchdogUs = Infinity;
  private watchdogLimitUs = Infinity;

  private hanging = false;

  /**
   * @param advance lets the surroundings run on, s; may throw to end the run
   * @param hangs whether the program hangs from now on
   */
  constructor(
    private readonly advance: (durationS: number) => void,
    private readonly hangs?: () => boolean,
  ) {}

  /** Time since power-on, s. */
  get nowS(): number {
    return this.nowUs / 1e6;
  }

  /**
   * Lets time pass for the program.
   *
   * @throws ChipReset when the watchdog strikes
   */
  spend(timeS: number): void {
    this.nowUs += timeS * 1e6;
    if (this.nowUs > this.watchdogUs) {
      this.nowUs = this.watchdogUs;
      this.catchUp();
      throw new ChipReset(`The watchdog was not fed for ${this.watchdogLimitUs / 1000} ms.`);
    }
    // A program that only looks at the clock must not keep the world from running on, and ending it.
    if (this.nowUs - this.worldUs > LONGEST_BEHIND_US) this.catchUp();
  }

  /** Lets the surroundings run up to the present. */
  catchUp(): void {
    const behindS = (this.nowUs - this.worldUs) / 1e6;
    if (behindS <= 0) return;
    this.worldUs = this.nowUs;
    this.advance(behindS);
    if (this.hanging || this.hangs?.() !== true) return;
    this.hanging = true;
    for (;;) this.spend(LONGEST_BEHIND_US / 1e6);
  }

  sleep(timeS: number): void {
    if (timeS > 0) this.spend(timeS);
    this.catchUp();
  }

  /** Value of a tick counter. */
  ticks(usPerTick: number): number {
    return Math.floor(wrapped((TICKS_PERIOD - US_BEFORE_WRAP + this.nowUs) / usPerTick));
  }

  startWatchdog(timeoutMs: number): void {
    this.watchdogLimitUs = timeoutMs * 1000;
    this.feedWatchdog();
  }

  /** Does nothing before the watchdog is started. */
  feedWatchdog(): void {
    this.watchdogUs = this.nowUs + this.watchdogLimitUs;
  }
}
