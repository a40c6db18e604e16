// What a control step costs in MicroPython: an ESTIMATE, as no board is at hand. Bytecodes of the step, counted (bench/micropython/count.py),
// weighed by the clock of the real interpreter (WebAssembly), where calls and attributes take longer than sums: the step's time against
// that of a loop of plain bytecodes. The weighed number times an assumed time for one plain bytecode is the estimate.
//
// The WebAssembly port has no native emitter (@micropython.native and .viper are "invalid micropython decorator" there), so that native code
// could not be tested against the twin: none is emitted.
import { spawnSync } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { basename, join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { loadMicroPython } from '@micropython/micropython-webassembly-pyscript';
import { deriveDesign } from '../dist/design/derive.js';
import { controlS } from '../dist/design/delay.js';
import { renderFirmware } from '../dist/firmware/render.js';
import { checkSheet } from '../dist/sheet/check.js';
import { toVehicle } from '../dist/sheet/to-vehicle.js';
import { meanAndMax, wanderingLine } from './cost/measure.js';

/** Cycles of one plain bytecode, dispatch and objects included, run from flash: assumed, from memory of such chips; between half and twice that. */
const CYCLES_PER_BYTECODE = 100;
/** Clocks of the two boards as MicroPython sets them: documentation of machine.freq(), rp2 and esp32 quick references. */
const CLOCK_HZ = { pico: 125e6, esp32: 160e6 };
const STEPS = 400;
const CALIBRATION_ROUNDS = 100_000;

const file = (name) => fileURLToPath(new URL(name, import.meta.url));
const demo = JSON.parse(readFileSync(file('../examples/tray-cart/tray-cart.json'), 'utf8'));
const motor = (left, right) => ({ scheme: 'pwm-in-in', left, right });
const esp32 = (control, more = {}) => ({
  ...demo,
  target: { board: 'esp32', language: 'micropython' },
  start: { ...demo.start, buttonPin: 4 },
  sensors: {
    ...demo.sensors,
    pins: [36, 39, 34, 35, 32, 33],
    calibration: { mode: 'stored', ground: Array(6).fill(492), line: Array(6).fill(3356) },
  },
  drive: { ...demo.drive, driver: motor({ pwm: 25, in1: 26, in2: 27 }, { pwm: 14, in1: 13, in2: 23 }) },
  control: { kind: control },
  ...more,
});
const bar = { ...demo.sensors };
delete bar.calibration;
const pico = (control) => ({
  ...esp32(control),
  target: { board: 'pico', language: 'micropython' },
  start: { ...demo.start, buttonPin: 'GP15' },
  sensors: {
    ...bar,
    kind: 'digital',
    lineLevel: 'high',
    pins: ['GP16', 'GP17', 'GP18', 'GP19', 'GP20', 'GP21'],
  },
  drive: {
    ...demo.drive,
    driver: motor({ pwm: 'GP2', in1: 'GP3', in2: 'GP4' }, { pwm: 'GP5', in1: 'GP6', in2: 'GP7' }),
  },
});
const ENCODERS = { encoders: { channels: 'single', linesPerTurn: 120, left: { a: 18 }, right: { a: 19 } } };
const SHEETS = {
  'esp32, pid, 6 analog': esp32('pid'),
  'esp32, rules, 6 analog': esp32('rules'),
  'esp32, pid, encoders': esp32('pid', ENCODERS),
  'pico, pid, 6 digital': pico('pid'),
  'pico, rules, 6 digital': pico('rules'),
};

/** Edges of both wheels and readings of each sensor, a line wandering under the bar. */
function inputs(vehicle) {
  const line = wanderingLine(6);
  return Array.from({ length: STEPS }, (_step, k) => {
    const counts = vehicle.bar.pins.map((_pin, i) => line(i, k * vehicle.board.samplePeriodS));
    const digital = vehicle.bar.kinds[0] === 'digital';
    return [3, 3, ...counts.map((count) => (digital ? Number(count > 480) : count * 4))];
  });
}

/** Bytecodes of each step, and of one round of the calibration loop. */
function bytecodes(folder, lines) {
  const input = lines.map((line) => line.join(' ')).join('\n');
  const { stdout, stderr, status } = spawnSync('python3', [file('micropython/count.py'), folder], { input });
  if (status !== 0) throw new Error(String(stderr));
  const numbers = String(stdout).trim().split('\n').map(Number);
  return { steps: numbers.slice(0, -1), round: numbers.at(-1) };
}

/** Bytecodes of a step by the real interpreter's clock. */
async function byClock(files, lines, round) {
  const python = await loadMicroPython({ heapsize: 4 << 20 });
  for (const { path, text } of files) python.FS.writeFile(`/${basename(path)}`, text);
  const loop = /^def calibration[^]*?return a\n/m.exec(readFileSync(file('micropython/count.py'), 'utf8'))[0];
  python.runPython(`
from array import array
from steering import Steering
steering = Steering()
steering.start()
lines = [(e, array("h", c)) for e, c in ${JSON.stringify(lines.map((line) => [line.slice(0, 2), line.slice(2)]))}]
${loop}
def steps():
    step = steering.step
    for edges, counts in lines:
        ${files.some(({ path }) => path.endsWith('wheel_loop.py')) ? 'steering.count_edges(*edges)' : 'pass'}
        step(counts)
`);
  const timed = (source) => {
    const times = Array.from({ length: 5 }, () => {
      const began = performance.now();
      python.runPython(source);
      return performance.now() - began;
    });
    return Math.min(...times);
  };
  const perBytecode = timed(`calibration(${CALIBRATION_ROUNDS})`) / (CALIBRATION_ROUNDS * round);
  return timed('for _ in range(5): steps()') / (5 * lines.length) / perBytecode;
}

for (const [name, sheet] of Object.entries(SHEETS)) {
  const checked = checkSheet(sheet);
  if (!checked.sheet) throw new Error(JSON.stringify(checked.problems, undefined, 1));
  const vehicle = toVehicle(checked.sheet);
  const files = await renderFirmware({ digest: '0'.repeat(64) }, deriveDesign(vehicle));
  const folder = mkdtempSync(join(tmpdir(), 'fairlead-bytecodes-'));
  for (const { path, text } of files) writeFileSync(join(folder, basename(path)), text);
  const lines = inputs(vehicle);
  const { steps, round } = bytecodes(folder, lines);
  rmSync(folder, { recursive: true });
  const { mean, max } = meanAndMax(steps);
  const clocked = await byClock(files, lines, round);
  const { board, bar } = vehicle;
  const perByteS = CYCLES_PER_BYTECODE / CLOCK_HZ[board.id];
  const readS = bar.kinds.reduce(
    (sum, kind) => sum + (kind === 'analog' ? board.adcReadS : board.digitalReadS),
    0,
  );
  const ms = (s) => (1e3 * s).toFixed(2);
  const stepS = ((max * clocked) / mean) * perByteS;
  const totalS = stepS + readS;
  console.log(
    `${name.padEnd(24)} ${mean.toFixed(0)} bytecodes mean, ${max} max, worth ${clocked.toFixed(0)} plain ones by the interpreter's clock;` +
      ` estimate: longest step ${ms(stepS)} ms (design reckons with ${ms(controlS(vehicle))}), with readings ${ms(totalS)} of ${ms(board.samplePeriodS)} ms: margin ${(board.samplePeriodS / totalS).toFixed(1)}`,
  );
}
console.log(
  `assumed: ${CYCLES_PER_BYTECODE} cycles a bytecode at ${CLOCK_HZ.pico / 1e6} MHz (pico) and ${CLOCK_HZ.esp32 / 1e6} MHz (esp32), from memory, not measured on a board`,
);
