/** The design: from the SI vehicle to speed classes, laws and the controller that is rendered. */
import type { ControllerConstants } from '../controller/constants.js';
import type { Vehicle } from '../vehicle/vehicle.js';
import { classConstants, firmwareGains, tableGainPerM2 } from './class-constants.js';
import { biasRemarks } from './bias.js';
import { controllerConstants } from './controller-constants.js';
import { delayBudget } from './delay.js';
import { isImage, mirroredVehicle } from '../vehicle/mirror.js';
import { calmLaws, swingRemarks } from './calm-laws.js';
import { type ClassBase, classBases } from './class-base.js';
import type { ClassSettings, Design, DesignedClass, Proof } from './design.js';
import { wheelLoopDesign } from './wheel-loop-design.js';
import { lawBinding } from './law-binding.js';
import { overrideRemarks } from './override-remarks.js';
import { Proving, slowestScale } from './proving.js';
import type { SpeedScale } from './speed-search.js';
import { bindingLimit } from './speed-classes.js';
import { keeps, lanePlantOf, marginsAt, worstMargins } from './tolerance-box.js';
import { overflows } from './intervals.js';
import { type SteeringGains, controllerOf } from './steering-loop.js';
import { EXIT, FairleadError, type Problem } from '../sheet/problem.js';

const NOMINAL = { gain: 1, lag: 1 };
/** The scale that leaves speeds at what the limits or the sheet allow. */
const AS_ALLOWED: SpeedScale = { top: Infinity, share: 1 };

const UNPROVEN_AS_GIVEN =
  'Perturbed rehearsals on the proving lane (straights into the tightest bend, S-bends, gap, crossing) miss the finish target at the speeds of the sheet. Lower them, or set /speeds/classes to auto.';

const UNPROVEN =
  'Perturbed rehearsals on the proving lane (straights into the tightest bend, S-bends, gap, crossing) miss the finish target even at a quarter of full speed. Widen the bar, move it further ahead, or lower the tolerances by measuring.';

/** A class at the speed that a scale leaves it. */
function settingsAt({ range, allowedMps, gains }: ClassBase, scale: SpeedScale): ClassSettings {
  const given = range.speedMps !== undefined;
  const speedMps = given ? allowedMps : Math.min(scale.top, scale.share * allowedMps);
  return { name: range.name, minRadiusM: range.minRadiusM, speedMps, gains };
}

function limitedBy({ range, allowedMps, limits }: ClassBase, speedMps: number): DesignedClass['limitedBy'] {
  if (range.speedMps !== undefined) return 'sheet';
  return speedMps < allowedMps ? 'finish' : bindingLimit(limits);
}

/** A class with the law that the firmware's integers stand for, and its margins. */
function designedClass(
  vehicle: Vehicle,
  base: ClassBase,
  settings: ClassSettings,
  gains: SteeringGains,
): DesignedClass {
  const { speedMps } = settings;
  const plant = lanePlantOf(vehicle, speedMps, NOMINAL);
  return {
    ...settings,
    wantedGains: settings.gains,
    gains,
    limits: base.limits,
    limitedBy: limitedBy(base, speedMps),
    plant,
    controller: controllerOf(gains, speedMps, plant.samplePeriodS),
    margins: marginsAt(vehicle, speedMps, gains, NOMINAL),
    worstMargins: worstMargins(vehicle, speedMps, gains),
    binding: lawBinding(vehicle, gains, speedMps, base.range.lawRadiusM),
  };
}

function refuseOverflow(vehicle: Vehicle, controller: ControllerConstants): void {
  const { board, language } = vehicle;
  const problems = overflows(controller, board.adcMaxCount, language).map(
    ({ name, magnitude, limit }): Problem => ({
      pointer: '',
      message: `The firmware's integers cannot hold an intermediate of the control law: ${name}.`,
      got: magnitude.toExponential(2),
      allowed: `at most ${limit}`,
      fix: 'Check the speeds and lengths of the sheet for a wrong unit.',
    }),
  );
  if (problems.length > 0)
    throw new FairleadError('No design meets the sheet.', { exitCode: EXIT.noDesign, problems });
}

/** Speeds and what proves them. */
interface Proven {
  scale: SpeedScale;
  proof: Proof;
  /** Whether the target is kept. */
  kept: boolean;
}

/** Speeds and what proves them. Speeds of the sheet are rehearsed as they stand: their scale leaves them alone. */
function provenScale(
  vehicle: Vehicle,
  proving: Proving,
  controllerAt: (scale: SpeedScale) => ControllerConstants,
): Proven {
  if (vehicle.speeds.classes === 'auto') {
    const best = proving.best(controllerAt);
    if (best) return { ...best, kept: true };
  }
  const scale = vehicle.speeds.classes === 'auto' ? slowestScale(vehicle) : AS_ALLOWED;
  const proof = proving.proof(controllerAt(scale));
  return { scale, proof, kept: proof.finished >= proof.targetShare * proof.runs };
}

function remarksOn(vehicle: Vehicle, classes: readonly DesignedClass[], proven: boolean): string[] {
  const weak = classes.filter((each) => !keeps(each.worstMargins)).map((each) => each.name);
  const remarks = proven ? [] : [vehicle.speeds.classes === 'auto' ? UNPROVEN : UNPROVEN_AS_GIVEN];
  if (weak.length > 0) {
    const whose = vehicle.control.gains ? 'The gains of the sheet' : 'The gains';
    remarks.push(
      `${whose} miss the required margins in some corner of the tolerances in ${weak.length === 1 ? 'class' : 'classes'} ${weak.join(', ')}: see the worst margins.`,
    );
  }
  return remarks;
}

/** What sets the speeds in the end, given the controller at each scale. */
type Prover = (controllerAt: (scale: SpeedScale) => ControllerConstants) => Proven;

/**
 * Designs the controller of a vehicle.
 *
 * @param provenOn vehicle on whose proving lane the speeds are proven; by default its own
 * @throws FairleadError with exit code 3 when nothing meets the sheet
 */
export function deriveDesign(vehicle: Vehicle, provenOn: Vehicle = vehicle): Design {
  return designBy(vehicle, (controllerAt) =>
    isImage(vehicle)
      ? provenOnImage(mirroredVehicle(vehicle), mirroredVehicle(provenOn))
      : provenScale(vehicle, new Proving(vehicle, provenOn), controllerAt),
  );
}

/** What rehearsals of the mirror image prove: noise and rounding are not mirrored, so one of the two stands for both. */
function provenOnImage(image: Vehicle, provenOn: Vehicle): Proven {
  let found: Proven | undefined;
  designBy(image, (controllerAt) => (found = provenScale(image, new Proving(image, provenOn), controllerAt)));
  return found!;
}

/** The design at the speeds that limits or sheet allow, without the rehearsals that prove them: `proof` tells of no runs. */
export function unprovenDesign(vehicle: Vehicle): Design {
  const targetShare = vehicle.speeds.finishTarget;
  const proof = { runs: 0, finished: 0, targetShare, confidenceShare: 0 };
  return designBy(vehicle, () => ({ scale: AS_ALLOWED, proof, kept: true }));
}

function designBy(vehicle: Vehicle, prove: Prover): Design {
  const bases = calmLaws(vehicle, classBases(vehicle));
  const settings = (scale: SpeedScale) => bases.map((base) => settingsAt(base, scale));
  const unscaled = controllerConstants(vehicle, settings(AS_ALLOWED));
  const tableGain = tableGainPerM2(vehicle, settings(AS_ALLOWED));
  // a scale changes the classes' speeds and nothing else of the controller
  const controllerAt = (scale: SpeedScale): ControllerConstants => ({
    ...unscaled,
    classes: classConstants(vehicle, settings(scale), tableGain, {
      gainBits: unscaled.steering.gainBits,
      slopeBits: unscaled.drive.slopeBits,
      integral: unscaled.integral,
    }),
  });
  const wheelLoop = wheelLoopDesign(vehicle);
  const { scale, proof, kept } = prove(controllerAt);
  const chosen = settings(scale);
  const controller = controllerAt(scale);
  refuseOverflow(vehicle, controller);
  const classes = chosen.map((each, i) =>
    designedClass(vehicle, bases[i]!, each, firmwareGains(vehicle, controller, i, tableGain)),
  );
  return {
    vehicle,
    proof,
    delay: delayBudget(vehicle),
    ...(wheelLoop && { wheelLoop }),
    classes,
    controller,
    remarks: [
      ...remarksOn(vehicle, classes, kept),
      ...biasRemarks({ vehicle, classes }),
      ...swingRemarks(vehicle, classes),
      ...overrideRemarks(vehicle, classes, tableGain),
    ],
  };
}
