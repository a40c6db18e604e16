/**
 * Faults at work in the plant: what they do to readings, wheels, battery and pose at a time.
 *
 * Stuck: the end of the converter's range, or the level. Noisy, a loose contact: anything in the range, anew at each reading. Unplugged: the
 * converter's capacitor keeps what it had from the channel before, so that the pin reads about what the sensor read before it
 * did (data sheets, Analog to Digital Converter, of sources with a high impedance), with hum of the mains, 50 Hz, on top; a
 * digital input follows the hum. How large the hum is depends on the wires: a tenth of the range, common practice.
 */
import type { Fault, SensorFault } from './fault.js';
import { STREAM } from './plant-parameters.js';
import { Random } from './random.js';

const HUM_HZ = 50;
const HUM_SHARE = 0.1;

export class PlantFaults {
  /** Light on all sensors, share of the difference between line and ground. */
  lightShare = 0;
  lineGone = false;
  blockedLeft = false;
  blockedRight = false;
  /** Undefined: as the plant has it. */
  batteryV: number | undefined;
  /** A push in this step: m to the left and rad; 0 mostly. */
  shiftM = 0;
  turnRad = 0;
  private readonly sensors: (SensorFault | undefined)[];
  private readonly done = new Set<Fault>();
  private readonly noise: Random;
  private timeS = 0;
  private countBefore = 0;

  constructor(
    private readonly faults: readonly Fault[],
    sensorCount: number,
    seed: number,
  ) {
    this.sensors = new Array<SensorFault | undefined>(sensorCount).fill(undefined);
    this.noise = new Random(seed, STREAM.faults);
  }

  /** To be called before each step of the plant. */
  update(timeS: number): void {
    this.timeS = timeS;
    this.lightShare = this.shiftM = this.turnRad = 0;
    this.lineGone = this.blockedLeft = this.blockedRight = false;
    this.batteryV = undefined;
    this.sensors.fill(undefined);
    for (const fault of this.faults) {
      if (timeS < fault.atS || timeS >= fault.atS + (fault.durationS ?? Infinity)) continue;
      if (fault.kind === 'sensor') this.sensors[fault.sensorIndex] = fault.how;
      else if (fault.kind === 'light') this.lightShare += fault.lightShare;
      else if (fault.kind === 'battery') this.batteryV = fault.batteryV;
      else if (fault.kind === 'line') this.lineGone = true;
      else if (fault.kind === 'wheel') {
        if (fault.side === 'left') this.blockedLeft = true;
        else this.blockedRight = true;
      } else if (fault.kind === 'bump' && !this.done.has(fault)) {
        this.done.add(fault);
        this.shiftM += fault.shiftM;
        this.turnRad += fault.turnRad;
      }
    }
  }

  /** What a sensor reads in place of a healthy reading; 0 to `most`, counts or a level. */
  faultyCount(index: number, healthyCount: number, most: number): number {
    const count = this.faulty(this.sensors[index], healthyCount, most);
    this.countBefore = count;
    return count;
  }

  private faulty(how: SensorFault | undefined, healthyCount: number, most: number): number {
    if (how === undefined) return healthyCount;
    if (how === 'stuck-high') return most;
    if (how === 'stuck-low') return 0;
    if (how === 'noisy') return Math.floor(this.noise.uniform(0, most + 1));
    const hum = Math.sin(2 * Math.PI * HUM_HZ * this.timeS);
    if (most === 1) return hum > 0 ? 1 : 0;
    return Math.round(Math.min(most, Math.max(0, this.countBefore + HUM_SHARE * most * hum)));
  }
}
