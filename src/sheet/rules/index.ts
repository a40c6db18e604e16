/** All rules across fields, in the order in which their problems are told. */
import { rule as bendInView } from './bend-in-view.js';
import { rule as bendIsCut } from './bend-is-cut.js';
import { rule as calibrationContrast } from './calibration-contrast.js';
import { rule as calibrationPolarity } from './calibration-polarity.js';
import { rule as driverPins } from './driver-pins.js';
import { rule as encoderChannels } from './encoder-channels.js';
import { rule as encoderRate } from './encoder-rate.js';
import { rule as encoderResolution } from './encoder-resolution.js';
import { rule as gapIsBridged } from './gap-is-bridged.js';
import { rule as integralPart } from './integral-part.js';
import { rule as languageFitsBoard } from './language-fits-board.js';
import { rule as lineCannotHide } from './line-cannot-hide.js';
import { rule as lineFitsBend } from './line-fits-bend.js';
import { rule as lineNarrowerThanBar } from './line-narrower-than-bar.js';
import { rule as motorOvervoltage } from './motor-overvoltage.js';
import { rule as pinCautions } from './pin-cautions.js';
import { rule as pinsAble } from './pins-able.js';
import { rule as pinsExist } from './pins-exist.js';
import { rule as pinsUsedOnce } from './pins-used-once.js';
import { rule as pwmLimit } from './pwm-limit.js';
import { rule as pwmOutputsDistinct } from './pwm-outputs-distinct.js';
import { rule as pwmTimers } from './pwm-timers.js';
import { rule as ruleOverrides } from './rule-overrides.js';
import type { SheetRule } from './rule.js';
import { rule as sensorCounts } from './sensor-counts.js';
import { rule as sensorKinds } from './sensor-kinds.js';
import { rule as sensorPositions } from './sensor-positions.js';
import { rule as slowClass } from './slow-class.js';
import { rule as classBends } from './class-bends.js';
import { rule as speedClasses } from './speed-classes.js';
import { rule as spotFitsLine } from './spot-fits-line.js';
import { rule as startDuty } from './start-duty.js';
import { rule as sweepSeesGround } from './sweep-sees-ground.js';
import { rule as topSpeed } from './top-speed.js';
import { rule as voltageOrder } from './voltage-order.js';
import { rule as withoutEffect } from './without-effect.js';

export const RULES: readonly SheetRule[] = [
  languageFitsBoard,
  sensorCounts,
  sensorKinds,
  sensorPositions,
  pinsExist,
  pinsUsedOnce,
  pinsAble,
  driverPins,
  encoderChannels,
  encoderRate,
  encoderResolution,
  pwmOutputsDistinct,
  pwmLimit,
  spotFitsLine,
  lineCannotHide,
  lineNarrowerThanBar,
  lineFitsBend,
  bendInView,
  gapIsBridged,
  calibrationContrast,
  sweepSeesGround,
  voltageOrder,
  startDuty,
  topSpeed,
  classBends,
  speedClasses,
  ruleOverrides,
  integralPart,
  bendIsCut,
  pwmTimers,
  pinCautions,
  calibrationPolarity,
  withoutEffect,
  motorOvervoltage,
  slowClass,
];
