/** Constants of time, of the integers' scales, and of the sweep, with their comments. */
import {
  CALIBRATION_BITS,
  CLASS_SPEED_BITS,
  COEFFICIENT_BITS,
  CURVATURE_BITS,
  type ControllerConstants,
  EDGE_BITS,
  EDGE_STEP_BITS,
  FILTER_BITS,
  FRACTION_BITS,
  FULL_COVERAGE,
  FULL_DUTY,
  GAP_HALF_BITS,
  OFFSET_PER_M,
  RULE_CURVATURE_BITS,
  SLOPE_BITS,
  SPEED_BITS,
  SPEED_MODEL_BITS,
  type SweepConstants,
  TRACK_BITS,
  WHEEL_GAIN_BITS,
  WHEEL_MODEL_BITS,
} from '../controller/constants.js';
import { mToMm, sToMs } from '../sheet/units.js';
import type { Vehicle } from '../vehicle/vehicle.js';
import { numberText } from './literals.js';
import { type Constant, constant } from './constant.js';
import type { Features } from './features.js';

/** Time for which a button must keep its level before it counts; contacts bounce for a few ms. Common practice. */
const DEBOUNCE_S = 0.02;
/** Length of one flash and of one pause of the LED. Common practice: slow enough to count. */
const BLINK_S = 0.2;
/** Samples begun too late in one run before the timing, and with it the design, no longer holds. */
const OVERRUN_LIMIT = 20;

export function timeConstants(
  vehicle: Vehicle,
  controller: ControllerConstants,
  features: Features,
): Constant[] {
  const { samplePeriodUs, countdownSamples, runLimitSamples } = controller;
  const periodS = vehicle.board.samplePeriodS;
  const samples = (timeS: number) => Math.max(1, Math.round(timeS / periodS));
  const { countdownS, runLimitS } = vehicle.start;
  const constants = [
    constant(
      'SAMPLE_PERIOD_US',
      'uint32_t',
      samplePeriodUs,
      `Period of the control loop, us: ${numberText(1 / periodS)} samples a second. From target.board.`,
    ),
    constant(
      'COUNTDOWN_SAMPLES',
      'uint16_t',
      // The press itself takes one sample.
      Math.max(1, countdownSamples),
      `From the button to the first motion: ${numberText(countdownS)} s. From start.countdownS.`,
    ),
    constant(
      'RUN_LIMIT_SAMPLES',
      'uint32_t',
      runLimitSamples,
      `Longest run: ${numberText(runLimitS)} s. From start.runLimitS.`,
    ),
    constant(
      'DEBOUNCE_SAMPLES',
      'uint8_t',
      samples(DEBOUNCE_S),
      `How long the button must keep its level to count: ${numberText(sToMs(DEBOUNCE_S))} ms. Common practice.`,
    ),
    constant(
      'OVERRUN_LIMIT',
      'uint16_t',
      OVERRUN_LIMIT,
      'Samples of one run that may begin a whole period late before the run is stopped. Common practice.',
    ),
  ];
  if (features.led)
    constants.push(
      constant(
        'BLINK_SAMPLES',
        'uint16_t',
        samples(BLINK_S),
        `Length of one flash and of one pause of the LED: ${numberText(BLINK_S)} s. Common practice.`,
      ),
    );
  return constants;
}

/** The scales; each vehicle gets those that its arithmetic uses. */
export function scaleConstants(controller: ControllerConstants, features: Features): Constant[] {
  const rows: [wanted: boolean, name: string, value: number, about: string][] = [
    [
      features.coverages,
      'FULL_COVERAGE_255THS',
      FULL_COVERAGE,
      'Coverage of a sensor whose spot lies wholly on the line.',
    ],
    [true, 'FULL_DUTY_Q12', FULL_DUTY, 'Duty of a motor at full voltage.'],
    [
      features.analog,
      'CALIBRATION_BITS',
      CALIBRATION_BITS,
      'Bits of the coverage per count beyond coverage.',
    ],
    [
      features.graded,
      'EDGE_BITS',
      EDGE_BITS,
      'Bits of the edge table: 4096 is half the way between two sensors.',
    ],
    [
      features.graded,
      'EDGE_STEP_BITS',
      EDGE_STEP_BITS,
      'Bits of coverage from one entry of the edge table to the next.',
    ],
    [
      features.graded,
      'GAP_HALF_BITS',
      GAP_HALF_BITS,
      "Bits of a gap's half width beyond those of an offset.",
    ],
    [features.encoders, 'WHEEL_MODEL_BITS', WHEEL_MODEL_BITS, "Bits of a wheel's modelled speed."],
    [features.encoders, 'WHEEL_GAIN_BITS', WHEEL_GAIN_BITS, "Bits of the wheel loops' proportional gain."],
    [true, 'FILTER_BITS', FILTER_BITS, 'Bits that a filtered value has beyond its input.'],
    [true, 'COEFFICIENT_BITS', COEFFICIENT_BITS, 'Bits of the filter and motor model coefficients.'],
    [
      features.rules,
      'RULE_CURVATURE_BITS',
      RULE_CURVATURE_BITS,
      'Bits of the curvature per wheel-speed difference.',
    ],
    [features.rules, 'FRACTION_BITS', FRACTION_BITS, "Bits of the rule table's wheel-speed fractions."],
    [true, 'CURVATURE_BITS', CURVATURE_BITS, 'Bits of a curvature beyond 1/m.'],
    [true, 'SPEED_BITS', SPEED_BITS, 'Bits of a speed: 8192 is the speed at full duty.'],
    [
      true,
      'CLASS_SPEED_BITS',
      CLASS_SPEED_BITS,
      "Bits of a class's speed; the two more make the firmware close a speed error 4 times as fast as the motors.",
    ],
    [true, 'SPEED_MODEL_BITS', SPEED_MODEL_BITS, 'Bits of the modelled speed.'],
    [true, 'SPEED_SLOPE_BITS', controller.drive.slopeBits, "Bits of a class's speed slope."],
    [true, 'TRACK_BITS', TRACK_BITS, 'Bits of the half track width beyond m, and of a turn for each speed.'],
    [true, 'SLOPE_BITS', SLOPE_BITS, 'Bits of the duty for each speed, in units of both.'],
  ];
  return rows
    .filter(([wanted]) => wanted)
    .map(([, name, value, about]) => constant(name, value > 255 ? 'int16_t' : 'uint8_t', value, about));
}

export function sweepConstants(controller: ControllerConstants, sweep: SweepConstants): Constant[] {
  const timeS = (samples: number) => numberText((samples * controller.samplePeriodUs) / 1e6, 3);
  const percent = (duty: number) => numberText((100 * duty) / FULL_DUTY, 3);
  const centreMm = numberText(mToMm(sweep.centreOffset / OFFSET_PER_M));
  return [
    constant(
      'SWEEP_DUTY_LEFT_Q12',
      'int16_t',
      sweep.dutyLeft,
      `Duty of the left wheel while the bar turns across the line: ${percent(sweep.dutyLeft)} %. From drive.`,
    ),
    constant(
      'SWEEP_DUTY_RIGHT_Q12',
      'int16_t',
      sweep.dutyRight,
      `Duty of the right wheel meanwhile: ${percent(sweep.dutyRight)} %. From drive.`,
    ),
    constant(
      'SWEEP_TURN_SAMPLES',
      'uint16_t',
      sweep.turnSamples,
      `First turn to the left, then twice as long to the right: ${timeS(sweep.turnSamples)} s. From sensors and drive.`,
    ),
    constant(
      'SWEEP_RETURN_SAMPLES',
      'uint16_t',
      sweep.returnSamples,
      `Longest turn back to the line: ${timeS(sweep.returnSamples)} s. From sensors and drive.`,
    ),
    constant(
      'SWEEP_CENTRE_MM_Q6',
      'int16_t',
      sweep.centreOffset,
      `Offset within which the line is found again: ${centreMm} mm. From sensors.pitchMm.`,
    ),
    constant(
      'SWEEP_LEAST_SPAN_COUNTS',
      'int16_t',
      sweep.minSpan,
      'Least difference between line and ground that is a contrast, counts; less is refused. From target.board.',
    ),
  ];
}
