/**
 * What the templates of both languages start from: the named constants of one vehicle with their comments, the words
 * of the header, and what this vehicle has. A language's own view model adds its pins and its files.
 */
import type { ControllerConstants } from '../controller/constants.js';
import { runIndex } from '../controller/run-index.js';
import { VERSION } from '../version.js';
import type { ConstantGroup } from './constant.js';
import { type Features, featuresOf } from './features.js';
import { type Reason, headerParagraphs, reasonsOf } from './header.js';
import type { FirmwareDesign, SheetIdentity } from './render.js';
import { type ClassRow, classRows } from './view-classes.js';
import { ledLine } from './view-pins.js';
import { driveConstants, memoryConstants, steeringConstants } from './view-drive.js';
import { sensingConstants } from './view-sensing.js';
import { wheelLoopConstants } from './view-wheel-loop.js';
import { scaleConstants, sweepConstants, timeConstants } from './view-time.js';

/** One action of the rule table: a run of sensors and the wheels' fractions of base speed. */
export interface RuleLine {
  left: number;
  right: number;
  /** "sensors 2 to 3" */
  about: string;
}

export interface CommonView extends Features {
  name: string;
  /** Paragraphs of the main file's header. */
  header: readonly string[];
  /** One line for the head of every other file. */
  origin: string;
  /** One line for the head of the user's own files. */
  hooks: string;
  /** The LED's pin as the language names it, with a word about it; empty without one. */
  ledCode: string;
  ledAbout: string;
  ledActiveLow: boolean;
  reasons: readonly Reason[];
  groups: readonly ConstantGroup[];
  classes: readonly ClassRow[];
  /** Rule table in the order of runIndex; empty with pid. */
  ruleLines: readonly RuleLine[];
  /** Where each first sensor's runs begin in it, less the sensor's number. */
  ruleRows: readonly number[];
}

function ruleLines(controller: ControllerConstants): RuleLine[] {
  const { rules, sensing } = controller;
  if (rules === undefined) return [];
  const lines: RuleLine[] = [];
  for (let first = 0; first < sensing.sensorCount; first++) {
    for (let last = first; last < sensing.sensorCount; last++) {
      const index = lines.length;
      const which = first === last ? `sensor ${first + 1}` : `sensors ${first + 1} to ${last + 1}`;
      lines.push({ left: rules.left[index]!, right: rules.right[index]!, about: which });
    }
  }
  return lines;
}

/** The part of the view model that does not depend on the language. */
export function commonView(sheet: SheetIdentity, design: FirmwareDesign): CommonView {
  const { vehicle, controller } = design;
  const led = ledLine(vehicle);
  const features = featuresOf(controller, vehicle, led !== undefined);
  const groups: ConstantGroup[] = [
    { title: 'Time', constants: timeConstants(vehicle, controller, features) },
    { title: 'Scales of the integers', constants: scaleConstants(controller, features) },
    { title: 'Sensor bar', constants: sensingConstants(vehicle, controller.sensing, features) },
    { title: 'Steering', constants: steeringConstants(controller, features) },
    { title: 'Drive', constants: driveConstants(vehicle, controller) },
    { title: 'Memory of the line', constants: memoryConstants(controller, features) },
  ];
  if (features.encoders) groups.push({ title: 'Wheel loops', constants: wheelLoopConstants(controller) });
  if (controller.sweep !== undefined)
    groups.push({ title: 'Calibration by sweep', constants: sweepConstants(controller, controller.sweep) });
  return {
    ...features,
    name: vehicle.name,
    header: headerParagraphs(sheet, vehicle, features),
    origin: `Part of the firmware of ${vehicle.name}. Written by fairlead ${VERSION}; change the build sheet, not this file.`,
    hooks: `Yours: code of your own for ${vehicle.name}. fairlead wrote this file once and leaves it alone.`,
    ledCode: led?.code ?? '',
    ledAbout: led?.about ?? '',
    ledActiveLow: led?.activeLow ?? false,
    reasons: reasonsOf(features),
    groups,
    classes: classRows(design),
    ruleLines: ruleLines(controller),
    ruleRows: Array.from(
      { length: controller.sensing.sensorCount },
      (_, first) => runIndex(first, first, controller.sensing.sensorCount) - first,
    ),
  };
}
