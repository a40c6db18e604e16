// How long the whole design takes, for 2, 6, 8 and 16 sensors and both controllers: seconds, and as a ratio to a fixed piece of
// arithmetic timed in the same run, so that machines can be compared. Runs on the built package: `npm run build` first.
import { readFileSync } from 'node:fs';
import { checkSheet } from '../dist/sheet/check.js';
import { toVehicle } from '../dist/sheet/to-vehicle.js';
import { deriveDesign } from '../dist/design/derive.js';

const TRIES = 3;
const SIZE = 400;
const sheet = JSON.parse(
  readFileSync(new URL('../examples/tray-cart/tray-cart.json', import.meta.url), 'utf8'),
);
const { sheet: checked } = checkSheet(sheet);
const demo = toVehicle(checked);

/** Median time of a few tries, s. */
function timed(work) {
  const times = Array.from({ length: TRIES }, () => {
    const start = performance.now();
    work();
    return (performance.now() - start) / 1000;
  });
  return times.toSorted((a, b) => a - b)[Math.floor(TRIES / 2)];
}

/** The reference: a product of two 400 by 400 matrices of doubles in plain loops. */
function reference() {
  const a = Float64Array.from({ length: SIZE * SIZE }, (_, i) => Math.sin(i));
  const product = new Float64Array(SIZE * SIZE);
  for (let i = 0; i < SIZE; i++)
    for (let j = 0; j < SIZE; j++) {
      let sum = 0;
      for (let k = 0; k < SIZE; k++) sum += a[i * SIZE + k] * a[k * SIZE + j];
      product[i * SIZE + j] = sum;
    }
  return product;
}

/** The demo cart with another number of sensors on a bar of the same spacing. */
function withSensors(count, kind) {
  const positionsM = Array.from({ length: count }, (_, i) => ((count - 1) / 2 - i) * 0.01);
  const { ground, line } = demo.bar.calibration;
  return {
    ...demo,
    control: { ...demo.control, kind },
    bar: {
      ...demo.bar,
      positionsM,
      // a bar of two sees little: the bend that it can follow is wider
      calibration: {
        mode: 'stored',
        ground: positionsM.map(() => ground[0]),
        line: positionsM.map(() => line[0]),
      },
    },
    line: { ...demo.line, tightestRadiusM: count < 4 ? 0.25 : demo.line.tightestRadiusM },
  };
}

reference();
deriveDesign(demo);
const referenceS = timed(reference);
console.log(`reference: 400 x 400 matrix product ${(referenceS * 1000).toFixed(0)} ms`);
for (const kind of ['pid', 'rules']) {
  for (const count of [2, 6, 8, 16]) {
    const vehicle = withSensors(count, kind);
    const seconds = timed(() => deriveDesign(vehicle));
    console.log(
      `${kind.padEnd(5)} ${String(count).padStart(2)} sensors: ${seconds.toFixed(2)} s, ${(seconds / referenceS).toFixed(1)} times the reference`,
    );
  }
}
