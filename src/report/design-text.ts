/** The design as a person reads it: each number with its unit and where it comes from. */
import { CLASS_SPEED_BITS, OFFSET_PER_M, fullSpeedMps } from '../controller/constants.js';
import type { Design, DesignedClass } from '../design/design.js';
import { lineLossBoundS } from '../design/line-loss.js';
import { stopBoundS } from '../design/delay.js';
import { LEAST_MARGINS } from '../design/tolerance-box.js';
import { filterTimeS } from '../design/steering-loop.js';
import { biasOffsetM, hasIntegral } from '../design/bias.js';
import { cornerText } from '../design/law-binding.js';
import { quantisedConstants, worstQuantised } from '../design/quantisation.js';
import { viewM } from '../design/bar-view.js';
import { fractionToPercent, mToMm, sToMs } from '../sheet/units.js';
import { CONFIDENCE_SHARE, runsToShow } from '../statistics/rates.js';
import { ruleLines } from './rule-text.js';
import { wheelLoopLines } from './wheel-loop-text.js';
import { table } from './text-table.js';

export const LIMIT_REASONS: Readonly<Record<DesignedClass['limitedBy'], string>> = {
  motor: 'outer wheel at full duty',
  grip: 'grip, sqrt(mu g R)',
  view: 'line still under the bar on entry',
  control: 'steering margins over the tolerance box',
  finish: 'perturbed rehearsals of the twin',
  sheet: 'given in the sheet',
};

/** Turn by which people who set courses tell how sharp a bend is. */
const QUARTER_TURN_RAD = Math.PI / 2;

function speedTable(classes: readonly DesignedClass[]): string {
  const rows = classes.map((each) => [
    each.name,
    mToMm(each.minRadiusM).toFixed(0),
    mToMm(each.minRadiusM * QUARTER_TURN_RAD).toFixed(0),
    each.speedMps.toFixed(2),
    ...(['motor', 'grip', 'view', 'control'] as const).map((limit) => each.limits[limit].toFixed(2)),
    LIMIT_REASONS[each.limitedBy],
  ]);
  const head = [
    'class',
    'radius from, mm',
    '90 deg within, mm',
    'speed, m/s',
    'motor',
    'grip',
    'view',
    'control',
    'limited by',
  ];
  return table([head, ...rows]);
}

function lawTable(classes: readonly DesignedClass[]): string {
  const rows = classes.map(({ name, gains, plant, margins, worstMargins }) => [
    name,
    gains.proportionalPerM2.toFixed(0),
    sToMs(gains.derivativeTimeS).toFixed(0),
    sToMs(filterTimeS(gains, plant.samplePeriodS)).toFixed(1),
    ...(gains.integralDistanceM === undefined ? [] : [mToMm(gains.integralDistanceM).toFixed(0)]),
    ...[margins, worstMargins].flatMap((each) => [
      each.gainMargin.toFixed(1),
      each.phaseMarginDeg.toFixed(0),
      each.ms.toFixed(2),
    ]),
  ]);
  const integral = hasIntegral({ classes }) ? ['Di, mm'] : [];
  const head = ['class', 'kp, 1/m^2', 'Td, ms', 'Tf, ms', ...integral];
  head.push('GM', 'PM, deg', 'Ms', 'worst GM', 'PM, deg', 'Ms');
  return table([head, ...rows]);
}

function bindingTable(classes: readonly DesignedClass[]): string {
  const rows = classes.map(({ name, binding }) => [
    name,
    binding.proportional,
    binding.filter,
    binding.nearest,
    cornerText(binding.corner),
    fractionToPercent(binding.wheelShare).toFixed(0),
  ]);
  const head = ['class', 'kp set by', 'Tf set by', 'least room', 'in the corner', 'wheels used, %'];
  return table([head, ...rows]);
}

function vehicleLines(design: Design): string {
  const { vehicle, controller } = design;
  const { drive, bar, line } = vehicle;
  const rows = [
    [
      'top speed',
      `${drive.topSpeedMps.toFixed(3)} m/s`,
      'pi x wheel diameter x no-load speed x nominal / rated voltage',
    ],
    ['view', `${mToMm(viewM(vehicle)).toFixed(1)} mm to each side`, 'outermost sensor, line width and spot'],
    ['tightest bend', `${mToMm(line.tightestRadiusM).toFixed(0)} mm`, 'sheet'],
    ['look-ahead', `${mToMm(bar.aheadM).toFixed(0)} mm`, 'sheet'],
    ['sample period', `${sToMs(vehicle.board.samplePeriodS).toFixed(1)} ms`, vehicle.board.title],
    ...design.delay.shares.map(({ name, delayS, source }) => [
      `delay: ${name}`,
      `${sToMs(delayS).toFixed(2)} ms`,
      source,
    ]),
    ['delay in all', `${sToMs(design.delay.totalS).toFixed(2)} ms`, 'without the hold of one sample'],
    [
      'unequal motors',
      `${mToMm(biasOffsetM(design)).toFixed(1)} mm to the side at most`,
      vehicle.encoders
        ? 'the encoders hold both to their speeds'
        : hasIntegral(design)
          ? 'offset at the bar until the integral part has taken it up'
          : 'steady offset at the bar; the law has no integral part',
    ],
    [
      'search speed',
      `${((controller.drive.searchSpeed / (1 << CLASS_SPEED_BITS)) * fullSpeedMps(controller)).toFixed(2)} m/s`,
      'for a lost line',
    ],
    [
      'line lost for good',
      `motors off within ${lineLossBoundS(controller).toFixed(2)} s`,
      'longest gap at the slowest class, then the search',
    ],
    ...(vehicle.stopInput
      ? [
          [
            'stop input opened',
            `motors off within ${sToMs(stopBoundS(vehicle)).toFixed(1)} ms`,
            'a sample period and the delay in all; on again only by the button',
          ],
        ]
      : []),
    [
      'side memory from',
      `${mToMm(controller.memory.sideOffset / OFFSET_PER_M).toFixed(1)} mm`,
      'beyond: left by the side, not a gap',
    ],
  ];
  const worst = worstQuantised(quantisedConstants(design));
  if (worst) {
    const percent = fractionToPercent(worst.relativeError).toFixed(2);
    rows.push(['largest rounding', `${percent} %`, `${worst.name}, in the firmware's integers`]);
  }
  return table(rows);
}

/** What the rehearsals of the design show, and what would show more. */
export function proofLines({ proof }: Design): string {
  const { runs, finished, targetShare, confidenceShare } = proof;
  const target = fractionToPercent(targetShare);
  const confidence = Math.floor(fractionToPercent(confidenceShare));
  const shown = `Finish target ${target} %: ${finished} of ${runs} drawn vehicles finish the proving lane at these speeds, which shows it with ${confidence} % confidence.`;
  if (confidenceShare >= CONFIDENCE_SHARE) return shown;
  const needed = runsToShow(targetShare, 0);
  return `${shown}\n${needed} without a loss would show it with 95 %: rehearse with --runs ${needed} on your course.`;
}

/** The whole text of `fairlead derive`. */
export function designText(design: Design): string {
  const { vehicle, classes, controller } = design;
  const required = `Required in every corner of the tolerance box: gain margin ${LEAST_MARGINS.gainMargin}, phase margin ${LEAST_MARGINS.phaseMarginDeg} deg, Ms ${LEAST_MARGINS.ms} at most.`;
  const parts = [
    `${vehicle.name}: ${controller.kind === 'rules' ? 'rule table' : `feedback (${hasIntegral(design) ? 'PID' : 'PD'})`} on ${vehicle.board.title}`,
    vehicleLines(design),
    'Speed classes (speeds and limits in m/s at nominal voltage)',
    speedTable(classes),
    proofLines(design),
    `Steering: curvature = kp (offset + Td d offset/dt${hasIntegral(design) ? ' + integral of the offset over the way / Di' : ''}), derivative filtered with Tf`,
    lawTable(classes),
    required,
    bindingTable(classes),
    'Wheels used: largest turn rate asked for on entry into the bend, of what the wheels can do; above 100 % they saturate and keep their difference.',
    ...wheelLoopLines(design.wheelLoop),
    ...ruleLines(design),
    ...design.remarks.map((remark) => `Note: ${remark}`),
  ];
  return `${parts.join('\n\n')}\n`;
}
