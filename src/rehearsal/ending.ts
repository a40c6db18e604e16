/**
 * How a run with faults ended for the vehicle: whether its motors went off, how soon, and what its LED says about it.
 *
 * The LED is read as a person reads it, from its light alone: flashes of 0.2 s, 0.6 s dark before a detail, 1.2 s dark after a code.
 */
import { reasonOfFlashes } from '../firmware/header.js';
import { ledLine } from '../firmware/view-pins.js';
import type { PinFacts } from '../vehicle/board-facts.js';
import { findPin } from '../vehicle/boards.js';
import type { Vehicle } from '../vehicle/vehicle.js';

export interface Ending {
  /** The firmware has switched the motors off. */
  motorsOff: boolean;
  /** From the first fault to the last moment at which a motor was driven, s; null while they are on. */
  reactionS: number | null;
  /** Why, as the LED shows it or the twin knows it; null where nothing tells. */
  reason: string | null;
  /** A motor was driven again without the button. */
  restarted: boolean;
}

/** The dark between two flashes is 0.2 s, before a detail 0.8 s, after a code 1.4 s (templates, blink). */
const DETAIL_AFTER_S = 0.5;
const CODE_AFTER_S = 1.1;

/** Reads the code that a LED flashes. */
export class LedReader {
  /** Flashes of the first whole code; undefined until there was one. */
  flashes: number | undefined;
  private lit = false;
  private changedS = 0;
  /** Flashes since the last long dark; counts only after one. */
  private counted = 0;
  private codeFlashes: number | undefined;
  private whole = false;

  /** To be called often, with whether the LED is lit. */
  look(lit: boolean, timeS: number): void {
    const sinceS = timeS - this.changedS;
    if (!this.lit && !lit && sinceS > CODE_AFTER_S && this.counted > 0) {
      if (this.whole) this.flashes ??= this.codeFlashes ?? this.counted;
      this.whole = true;
      this.counted = 0;
      this.codeFlashes = undefined;
    }
    if (lit === this.lit) return;
    if (lit) {
      if (sinceS > DETAIL_AFTER_S && this.counted > 0) {
        this.codeFlashes ??= this.counted;
        this.counted = 0;
      }
      this.counted++;
    }
    this.lit = lit;
    this.changedS = timeS;
  }

  /** The firmware's name of the reason. */
  get reason(): string | null {
    return this.flashes === undefined ? null : (reasonOfFlashes(this.flashes) ?? null);
  }
}
/** Time for which a vehicle is watched after its motors went off, s: at least two of the longest codes. */
export const WATCHED_S = 14;

/** The pin of the LED that shows the reason, and whether it is lit while low; undefined without one. */
export function ledPin(vehicle: Vehicle): { pin: PinFacts; activeLow: boolean } | undefined {
  const led = ledLine(vehicle);
  const pin = led && findPin(vehicle.board, led.label);
  return pin && { pin, activeLow: led.activeLow };
}
