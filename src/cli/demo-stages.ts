/**
 * The stages of the demo, each on its own: derive, render, rehearse, draw.
 *
 * They take the same way as the commands; only the sheets and the course are fixed.
 */
import { mkdir } from 'node:fs/promises';
import { basename, join } from 'node:path';
import writeFileAtomic from 'write-file-atomic';
import type { Lane } from '../course/lane.js';
import type { Design } from '../design/design.js';
import { planRender } from '../firmware/plan.js';
import { renderProject } from '../firmware/papers.js';
import { writePlan } from '../firmware/write.js';
import { designFor } from '../pipeline.js';
import type { EngineName } from '../rehearsal/engine.js';
import { engineFor } from '../rehearsal/engines.js';
import { rehearse, type Rehearsal } from '../rehearsal/runner.js';
import type { DrivenRun } from '../report/driven-run.js';
import { driveSvg } from '../report/drive-svg.js';
import { runSummary } from '../report/rehearsal-text.js';
import type { ResolvedSheet } from '../sheet/defaults.js';
import type { LoadedSheet } from '../sheet/load.js';
import { EXIT, FairleadError } from '../sheet/problem.js';
import { COURSE } from './demo-files.js';

const LAPS = 2;

/** A sheet of the demo that was found sound. */
export type DemoSheet = LoadedSheet & { path: string };

type ControlKind = Design['vehicle']['control']['kind'];

/** A vehicle of the demo: its sheet, and its design with each kind of controller. */
export interface DemoVehicle {
  path: string;
  sheet: ResolvedSheet;
  digest: string;
  /** The design that the sheet asks for; one of `designs`. */
  design: Design;
  designs: Readonly<Record<ControlKind, Design>>;
}

/** Derives the sheet's design and that with the other controller. */
export function derive({ path, sheet, digest }: DemoSheet): DemoVehicle {
  const designOf = (kind: ControlKind) => designFor({ ...sheet, control: { ...sheet.control, kind } });
  const designs = { pid: designOf('pid'), rules: designOf('rules') };
  return { path, sheet, digest, design: designs[sheet.control.kind], designs };
}

export interface RenderedDemo {
  vehicle: DemoVehicle;
  /** The firmware's folder. */
  folder: string;
  files: number;
  /** Files that were not there yet or were another version. */
  written: number;
}

/** Writes the firmware below `out`. */
export async function render(vehicle: DemoVehicle, out: string): Promise<RenderedDemo> {
  const { digest, design } = vehicle;
  const plan = await planRender(await renderProject({ digest }, design), { digest }, out);
  await writePlan(plan);
  const written = plan.files.filter(({ status }) => status === 'new' || status === 'changed').length;
  return { vehicle, folder: join(out, plan.folder), files: plan.files.length, written };
}

/** One rehearsal of the demo. */
export interface RehearsalTask {
  vehicle: DemoVehicle;
  control: ControlKind;
  engine: EngineName;
  /** How many vehicles drawn from the tolerances; 0 for the one in the sheet. */
  drawn: number;
}

/** How a rehearsal went, or what was missing for it. */
export type Driven = RehearsalTask & ({ rehearsal: Rehearsal } | { missing: string });

/** The rehearsals of one vehicle: many on the twin, and the firmware itself with either controller. */
export function tasksOf(vehicle: DemoVehicle, drawn: number): RehearsalTask[] {
  const engine = vehicle.design.vehicle.language === 'arduino' ? 'chip' : 'micropython';
  return [
    { vehicle, control: vehicle.sheet.control.kind, engine: 'twin', drawn },
    { vehicle, control: 'pid', engine, drawn: 0 },
    { vehicle, control: 'rules', engine, drawn: 0 },
  ];
}

/** Drives one rehearsal; a missing tool is no failure here, since the demo goes on without it. */
export async function drive(task: RehearsalTask, lane: Lane): Promise<Driven> {
  const design = task.vehicle.designs[task.control];
  try {
    const engine = await engineFor(task.engine, { digest: task.vehicle.digest }, design);
    const [runs, seed] = task.drawn > 0 ? [task.drawn, 1] : [1, 0];
    const rehearsal = await rehearse({ vehicle: design.vehicle, lane, engine, runs, seed, laps: LAPS });
    return { ...task, rehearsal };
  } catch (error) {
    if (!(error instanceof FairleadError) || error.exitCode !== EXIT.toolMissing) throw error;
    return { ...task, missing: error.message };
  }
}

export interface Picture {
  run: DrivenRun;
  /** One line: engine, verdict, lap, error. */
  summary: string;
  file: string;
}

/** Draws the first run of the vehicle's last rehearsal with the sheet's own controller: its firmware's, where that was driven. */
export async function draw(
  vehicle: DemoVehicle,
  drives: readonly Driven[],
  lane: Lane,
  out: string,
): Promise<Picture | undefined> {
  const own = drives.filter(
    (each) => each.vehicle === vehicle && each.control === vehicle.sheet.control.kind && 'rehearsal' in each,
  );
  const last = own.at(-1);
  if (last === undefined || !('rehearsal' in last)) return undefined;
  const { results, report, bound } = last.rehearsal;
  const result = results[0];
  if (result?.trace === undefined) return undefined;
  const { trace, loss } = result;
  const run = { lane, trace, ...(loss === undefined ? {} : { loss }) };
  const summary = runSummary(result, report.engine, bound.lapS);
  const file = join(out, `${vehicle.sheet.name}.svg`);
  await mkdir(out, { recursive: true });
  await writeFileAtomic(
    file,
    driveSvg(run, { title: `${vehicle.sheet.name} on ${basename(COURSE)}`, summary }),
  );
  return { run, summary, file };
}
