/** Light on the floor and wear of the line, as the bar meets them along the lane: how much contrast is left, and what is added. */
import type { PlantParameters } from './plant-parameters.js';
import { LIGHT_PERIOD_M, WEAR_LENGTH_SHARE, WEAR_PERIOD_M } from './plant-table.js';

const TURN = 2 * Math.PI;
/** The sine at so many places of a turn, and at the first once more; between them it is interpolated, to 5e-6. */
const SINE_STEPS = 1024;
const SINE = Float64Array.from({ length: SINE_STEPS + 1 }, (_, i) => Math.sin((TURN * i) / SINE_STEPS));

export class FloorLight {
  /** Difference between line and ground over that of the readings. */
  contrast: number;
  /** Ambient light, share of that difference. */
  ambient = 0;
  /** Whether it differs from place to place. */
  readonly varies: boolean;

  constructor(private readonly parameters: Readonly<PlantParameters>) {
    this.contrast = parameters.contrast;
    this.varies = parameters.lightShare !== 0 || parameters.wearShare !== 0;
  }

  /** @param alongM where the bar is along the lane, laps counted on */
  update(alongM: number): void {
    const { contrast, lightShare, lightPhaseRad, wearShare, wearPhaseRad } = this.parameters;
    const periods = alongM / WEAR_PERIOD_M + wearPhaseRad / TURN;
    const wear = periods - Math.floor(periods);
    this.contrast = wear < WEAR_LENGTH_SHARE ? contrast * (1 - wearShare) : contrast;
    const turns = alongM / LIGHT_PERIOD_M + lightPhaseRad / TURN;
    const place = (turns - Math.floor(turns)) * SINE_STEPS;
    const before = Math.floor(place);
    const sine = SINE[before]! + (place - before) * (SINE[before + 1]! - SINE[before]!);
    this.ambient = lightShare * sine;
  }
}
