// What the demo vehicles do about faults, and how soon: each fault on the twin, the emulated chip and the MicroPython interpreter, with
// feedback and with rules. "on" means that nothing in the firmware stopped the vehicle in the 10 s after it was lost; "finished" that it
// bore the fault. Runs on the built package: `npm run build` first. `-- faults` alone takes some minutes.
import { readFileSync } from 'node:fs';
import { Lane } from '../dist/course/lane.js';
import { deriveDesign } from '../dist/design/derive.js';
import { lineLossBoundS } from '../dist/design/line-loss.js';
import { engineFor } from '../dist/rehearsal/engines.js';
import { checkFaults, parseFault } from '../dist/rehearsal/fault.js';
import { runSetup } from '../dist/rehearsal/runner.js';
import { checkSheet } from '../dist/sheet/check.js';
import { toVehicle } from '../dist/sheet/to-vehicle.js';

const FAULTS = [
  'line=gone@2s',
  'line=gone@2s+0.03s',
  ...['stuck-high', 'stuck-low', 'noisy', 'unplugged'].flatMap((how) => [
    `sensor=1:${how}@2s`,
    `sensor=3:${how}@2s`,
  ]),
  'light=40%@2s',
  'light=80%@2s',
  'light=-40%@2s',
  'light=80%@2s+0.1s',
  'battery=4.2V@2s',
  'wheel=left:blocked@2s',
  'bump=15mm:10deg@2s',
  'program=hangs@2s',
  'supply=breaks@2s',
];
const example = (name) =>
  JSON.parse(readFileSync(new URL(`../examples/tray-cart/${name}`, import.meta.url), 'utf8'));
const lane = new Lane(example('nursery-lane.json'));

function verdict({ loss, ending }) {
  if (loss === undefined) return 'finished';
  if (!ending.motorsOff) return `on (${loss.reason})`;
  const off = `${(1000 * ending.reactionS).toFixed(0)} ms ${ending.reason ?? ''}`;
  return ending.restarted ? `${off}, DRIVEN AGAIN` : off;
}

async function outcome(engine, vehicle, text) {
  const faults = [parseFault(text)];
  try {
    checkFaults(faults, vehicle, engine.name);
  } catch {
    return '-';
  }
  return verdict(await engine.run(runSetup(vehicle, lane, 0, 2, false, faults)));
}

const columns = [];
for (const [file, names] of [
  ['tray-cart.json', ['twin', 'chip']],
  ['tray-cart-pico.json', ['micropython']],
])
  for (const kind of ['pid', 'rules']) {
    const sheet = example(file);
    const vehicle = toVehicle(checkSheet({ ...sheet, control: { kind } }).sheet);
    const design = deriveDesign(vehicle);
    const boundMs = 1000 * lineLossBoundS(design.controller);
    for (const name of names) {
      const engine = await engineFor(name, { digest: '0'.repeat(64) }, design);
      columns.push({ title: `${name}, ${kind}`, vehicle, engine, boundMs });
    }
  }
const cell = (text) => text.padEnd(26);
console.log([cell('fault'), ...columns.map(({ title }) => cell(title))].join(' '));
for (const text of FAULTS) {
  const cells = [];
  for (const { engine, vehicle } of columns) cells.push(cell(await outcome(engine, vehicle, text)));
  console.log([cell(text), ...cells].join(' ').trimEnd());
}
console.log(
  [cell('bound, line lost for good'), ...columns.map(({ boundMs }) => cell(`${boundMs.toFixed(0)} ms`))].join(
    ' ',
  ),
);
