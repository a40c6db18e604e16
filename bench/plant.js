// How fast the simulated vehicle is: simulated seconds per second of the plant with its sensors and its place on the lane,
// stepped each 2 ms and steered by a few lines of arithmetic, on the demo lane; then with twice the sensors and with a lane
// twice as long. Also the cost of a single look at the lane. Runs on the built package: `npm run build` first.
import { readFileSync } from 'node:fs';
import { compileCourse } from '../dist/course/lane.js';
import { makeProjection } from '../dist/course/projection.js';
import { Plant } from '../dist/rehearsal/plant.js';
import { perturbedPlant } from '../dist/rehearsal/plant-parameters.js';
import { checkSheet } from '../dist/sheet/check.js';
import { toVehicle } from '../dist/sheet/to-vehicle.js';

const SECONDS = 100;
/** Of so many tries the quickest counts: other work on the machine only slows it. */
const TRIES = 5;
const STEP_S = 2e-3;
const example = (name) =>
  JSON.parse(readFileSync(new URL(`../examples/tray-cart/${name}`, import.meta.url), 'utf8'));
const course = example('nursery-lane.json');
const demo = toVehicle(checkSheet(example('tray-cart.json')).sheet);

/** The demo cart drawn by seed 1, all its imperfections with it, with so many sensors on a bar of the same width. */
function parameters(sensorCount) {
  const { bar } = demo;
  const positionsM = Array.from(
    { length: sensorCount },
    (_, i) => ((sensorCount - 1) / 2 - i) * (0.05 / (sensorCount - 1)),
  );
  const all = (count) => Array(sensorCount).fill(count);
  const calibration = { ...bar.calibration, ground: all(123), line: all(839) };
  return { ...perturbedPlant({ ...demo, bar: { ...bar, positionsM, calibration } }, 1), startLateralM: 0 };
}

/** Drives at half duty toward the middle of what the sensors see; nanoseconds a step. */
function drive(lane, sensorCount) {
  const plant = new Plant(parameters(sensorCount), lane);
  const counts = new Int32Array(sensorCount);
  const { positionsM } = plant.parameters;
  let [turn, furthest] = [0, 0];
  const begun = performance.now();
  for (let step = 0; step < SECONDS / STEP_S; step++) {
    plant.readCounts(counts);
    let [sum, moment] = [0, 0];
    for (let i = 0; i < sensorCount; i++) {
      sum += counts[i] - 123;
      moment += (counts[i] - 123) * positionsM[i];
    }
    if (sum > 300) turn = (8 * moment) / sum;
    plant.step(0.35 - turn, 0.35 + turn, STEP_S);
    furthest = Math.max(furthest, Math.abs(plant.place.lateralM));
  }
  const ns = ((performance.now() - begun) * 1e6) / (SECONDS / STEP_S);
  if (furthest > 0.1) throw new Error('The vehicle left the lane: nothing was measured.');
  return { ns, lapped: plant.place.sM / lane.lengthM };
}

/** Nanoseconds of one call, the lane looked at all along and up to 30 mm beside it. */
function look(lane, call) {
  const points = Array.from({ length: 4096 }, (_, i) => {
    const pose = lane.poseAt((i / 4096) * lane.lengthM);
    const sideM = (((i * 37) % 61) - 30) / 1000;
    return [
      pose.xM - sideM * Math.sin(pose.headingRad),
      pose.yM + sideM * Math.cos(pose.headingRad),
      (i / 4096) * lane.lengthM,
    ];
  });
  const rounds = 500;
  let sum = 0;
  const begun = performance.now();
  for (let round = 0; round < rounds; round++) for (const [x, y, s] of points) sum += call(x, y, s);
  const ns = ((performance.now() - begun) * 1e6) / (rounds * points.length);
  if (Number.isNaN(sum)) throw new Error('not a number');
  return ns;
}

/** The quickest of several drives. */
function best(lane, sensorCount) {
  return Array.from({ length: TRIES }, () => drive(lane, sensorCount)).sort((a, b) => a.ns - b.ns)[0];
}

const lane = compileCourse(course);
const place = makeProjection();
const base = best(lane, 6);
const rows = [
  ['6 sensors, demo lane', base],
  ['12 sensors', best(lane, 12)],
  ['a lane twice as long', best(compileCourse(larger(course)), 6)],
];
for (const [name, { ns, lapped }] of rows) {
  const speed = (STEP_S * 1e9) / ns;
  console.log(
    `${name.padEnd(22)} ${ns.toFixed(0).padStart(6)} ns a step  ${speed.toFixed(0).padStart(6)} simulated s per s  ` +
      `${(ns / base.ns).toFixed(2)} x  (${lapped.toFixed(0)} laps)`,
  );
}
console.log(
  `coverage of one spot   ${look(lane, (x, y) => lane.coverage(x, y, 0.004))
    .toFixed(0)
    .padStart(6)} ns`,
);
console.log(
  `place on the lane      ${look(lane, (x, y, s) => (lane.project(x, y, s, place), place.sM))
    .toFixed(0)
    .padStart(6)} ns`,
);

/** The same lane twice as large, and so twice as long. */
function larger(original) {
  const scaled = (piece) =>
    Object.entries(piece).map(([key, value]) => [key, key.endsWith('Mm') ? 2 * value : value]);
  return { ...original, pieces: original.pieces.map((piece) => Object.fromEntries(scaled(piece))) };
}
