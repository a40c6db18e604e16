/** The questions in their groups and order, and when each is asked. What they say is in the schema. */
import type { BoardId } from '../vehicle/board-facts.js';
import { BOARDS } from '../vehicle/boards.js';
import { DRIVERS } from '../vehicle/drivers.js';
import { hasEncoders } from './encoders.js';
import type { Facts } from './facts.js';
import { choiceQuestion, common, fieldQuestion, yesNoQuestion } from './fields.js';
import { valueAt } from './json-tree.js';
import { kindsQuestion } from './kinds-question.js';
import { classesQuestion, positionsQuestion, readingsQuestion } from './lists.js';
import { fitQuestion, pinQuestion, planQuestion } from './pin-questions.js';
import { hasStandby, keptPinsFit, pinMode, pinNeeds, planProblem, schemeOf } from './pins.js';
import type { Question } from './question.js';
import { nodeAt } from './schema-node.js';
import { hasStopInput } from './stop-input.js';

export const GROUPS = {
  vehicle: 'Vehicle and board',
  line: 'Line',
  sensors: 'Sensors',
  drive: 'Drive',
  power: 'Power',
  control: 'Control and speeds',
  start: 'Start',
} as const;

export type GroupId = keyof typeof GROUPS;

/** One place in the questionnaire. */
export interface Entry {
  /** JSON pointer of the value in the sheet, or "#" and a name. */
  id: string;
  group: GroupId;
  readonly make: (facts: Facts) => Question;
  /** Whether it has its answer; left out, that is whether there is an acceptable value under its id. */
  readonly settled?: (facts: Facts) => boolean;
}

function field(group: GroupId, id: string): Entry {
  return { id, group, make: (facts) => fieldQuestion(id, facts) };
}

function boardQuestion(facts: Facts): Question {
  const question = fieldQuestion('/target/board', facts);
  const choices = (question.choices ?? []).map((choice) => {
    const { chip, pins } = BOARDS[choice.value as BoardId];
    const analog = pins.filter((pin) => pin.adc && pin.reserved === undefined).length;
    return { ...choice, meaning: `${chip}, ${analog} analog pins` };
  });
  return { ...question, choices };
}

function rowQuestion(facts: Facts): Question {
  const choices = [
    { value: 'even', label: 'evenly spaced', meaning: nodeAt('/sensors/pitchMm').title },
    { value: 'uneven', label: 'one by one', meaning: nodeAt('/sensors/positionsMm').title },
  ];
  return choiceQuestion({ ...common(nodeAt('/sensors')), title: 'Row of sensors' }, choices, facts.row);
}

function sensorEntries(facts: Facts): Entry[] {
  const group = 'sensors';
  const readings = ['ground', 'line'].map((side): Entry => {
    const id = `/sensors/calibration/${side}`;
    return { id, group, make: (now) => readingsQuestion(id, now) };
  });
  const kinds: Entry = { id: '/sensors/kinds', group, make: kindsQuestion };
  const positions: Entry = {
    id: '/sensors/positionsMm',
    group,
    make: (now) => positionsQuestion('/sensors/positionsMm', now),
  };
  const hasRow = (now: Facts): boolean =>
    Object.hasOwn(now.answers, '#row') || nodesGiven(now, '/sensors/pitchMm', '/sensors/positionsMm');
  return [
    field(group, '/sensors/kind'),
    field(group, '/sensors/count'),
    ...(facts.sensorKind === 'mixed' ? [kinds] : []),
    ...fitEntries(facts, group, '#fit'),
    { id: '#row', group, make: rowQuestion, settled: hasRow },
    facts.row === 'even' ? field(group, '/sensors/pitchMm') : positions,
    field(group, '/sensors/aheadOfAxleMm'),
    field(group, '/sensors/spotRadiusMm'),
    ...(facts.sensorKind === 'digital' ? [] : [field(group, '/sensors/calibration/mode')]),
    ...(facts.sensorKind === 'analog' ? [] : [field(group, '/sensors/lineLevel')]),
    ...(facts.stored ? readings : []),
  ];
}

function nodesGiven(facts: Facts, ...pointers: string[]): boolean {
  return pointers.some((pointer) => valueAt(facts.base, pointer) !== undefined);
}

function fitEntries(facts: Facts, group: GroupId, id: string): Entry[] {
  return planProblem(facts) ? [{ id, group, make: fitQuestion, settled: () => false }] : [];
}

const DRIVE = [
  'trackWidthMm',
  'wheelDiameterMm',
  'massKg',
  'gripCoefficient',
  'motor/noLoadRpm',
  'motor/ratedVoltageV',
  'motor/timeConstantMs',
  'motor/startDutyPercent',
  'motor/stallCurrentA',
  'driver/scheme',
];

function driveEntries(facts: Facts): Entry[] {
  const group = 'drive';
  const standby: Entry = {
    id: '#standby',
    group,
    make: (now) => yesNoQuestion(common(nodeAt('/drive/driver/standbyPin')), hasStandby(now)),
    settled: (now) => Object.hasOwn(now.answers, '#standby') || nodesGiven(now, '/drive/driver/scheme'),
  };
  const encoders: Entry = {
    id: '#encoders',
    group,
    make: (now) => yesNoQuestion(common(nodeAt('/encoders')), hasEncoders(now)),
    settled: (now) => Object.hasOwn(now.answers, '#encoders') || nodesGiven(now, '/drive/driver/scheme'),
  };
  const stopInput: Entry = {
    id: '#stopInput',
    group,
    make: (now) => yesNoQuestion({ ...common(nodeAt('/stopPin')), title: 'Stop input' }, hasStopInput(now)),
    settled: (now) => Object.hasOwn(now.answers, '#stopInput') || nodesGiven(now, '/drive/driver/scheme'),
  };
  const about = ['/encoders/channels', '/encoders/linesPerTurn'].map((id) => field(group, id));
  return [
    ...DRIVE.map((key) => field(group, `/drive/${key}`)),
    encoders,
    ...(hasEncoders(facts) ? about : []),
    ...(DRIVERS[schemeOf(facts)].standby ? [standby] : []),
    stopInput,
    ...pinEntries(facts, group),
  ];
}

function pinEntries(facts: Facts, group: GroupId): Entry[] {
  if (planProblem(facts)) return fitEntries(facts, group, '#fit-pins');
  const plan: Entry = {
    id: '#pins',
    group,
    make: planQuestion,
    settled: (now) => Object.hasOwn(now.answers, '#pins') || keptPinsFit(now),
  };
  if (pinMode(facts) !== 'by-hand') return [plan];
  const single = pinNeeds(facts).map((need): Entry => ({
    id: need.pointer,
    group,
    make: (now) => pinQuestion(need, now),
    settled: (now) => Object.hasOwn(now.answers, need.pointer),
  }));
  return [plan, ...single];
}

/** The questions that these facts raise, in order. */
export function entriesFor(facts: Facts): Entry[] {
  const fields = (group: GroupId, ...ids: string[]): Entry[] => ids.map((id) => field(group, id));
  const lineKeys = ['polarity', 'widthMm', 'tightestRadiusMm', 'longestGapMm', 'crossings'];
  return [
    field('vehicle', '/name'),
    { id: '/target/board', group: 'vehicle', make: boardQuestion },
    ...fields('line', ...lineKeys.map((key) => `/line/${key}`)),
    ...sensorEntries(facts),
    ...driveEntries(facts),
    ...fields('power', '/power/nominalV', '/power/fullV', '/power/emptyV'),
    field('control', '/control/kind'),
    { id: '/speeds/classes', group: 'control', make: (now) => classesQuestion('/speeds/classes', now) },
    field('control', '/speeds/finishTargetPercent'),
    ...fields('start', '/start/countdownS', '/start/runLimitS'),
  ];
}
