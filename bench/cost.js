// The control step of the generated sketch against one written as a tutorial would (bench/cost/tutorial.ino): float weighted
// average, float PID, analogRead(), analogWrite(). Cycle-exact on the emulated ATmega328P, both in one run.
import { readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { deriveDesign } from '../dist/design/derive.js';
import { renderFirmware } from '../dist/firmware/render.js';
import { buildSketch } from '../dist/rehearsal/chip-build.js';
import { checkSheet } from '../dist/sheet/check.js';
import { toVehicle } from '../dist/sheet/to-vehicle.js';
import { harshReadings, meanAndMax, measureSteps, wanderingLine } from './cost/measure.js';

const file = (name) => fileURLToPath(new URL(name, import.meta.url));
const SPAN = { sensorCount: 8, fromS: 1, toS: 4 };
const CYCLES_PER_US = 16;

const demo = JSON.parse(readFileSync(file('../examples/tray-cart/tray-cart.json'), 'utf8'));
const eight = (kind) => ({
  ...demo,
  target: { board: 'nano', language: 'arduino' },
  sensors: {
    ...demo.sensors,
    count: 8,
    pins: ['A0', 'A1', 'A2', 'A3', 'A4', 'A5', 'A6', 'A7'],
    calibration: { mode: 'stored', ground: Array(8).fill(123), line: Array(8).fill(839) },
  },
  control: { kind },
});

async function image(sheet) {
  const checked = checkSheet(sheet);
  if (!checked.sheet) throw new Error(JSON.stringify(checked.problems, undefined, 1));
  const design = deriveDesign(toVehicle(checked.sheet));
  const files = await renderFirmware({ digest: '0'.repeat(64) }, design);
  return buildSketch(files, checked.sheet.target.board);
}

function row(name, { program, flashBytes, ramBytes }, background) {
  const costs = measureSteps(program, wanderingLine(SPAN.sensorCount), SPAN);
  // one that waits for the converter spends all the time; one that does not spends its interrupts and what follows the scan
  const cycles = background
    ? costs.pwmCycles.map((pwm, i) => pwm + costs.interruptCycles[i])
    : costs.stepCycles;
  const step = meanAndMax(cycles);
  const pwm = meanAndMax(costs.pwmCycles);
  const rate = 16e6 / (meanAndMax(costs.scanCycles).max + pwm.max);
  const us = (value) => (value / CYCLES_PER_US).toFixed(1);
  console.log(
    `${name.padEnd(24)} ${String(costs.steps).padStart(5)} steps  step ${step.mean.toFixed(0).padStart(6)} mean ${String(step.max).padStart(6)} max cycles` +
      `  sampled to PWM ${us(pwm.mean).padStart(6)} mean ${us(pwm.max).padStart(6)} max us  up to ${rate.toFixed(0).padStart(5)} Hz  flash ${flashBytes}  RAM ${ramBytes}`,
  );
  return { step, pwm };
}

const text = readFileSync(file('cost/tutorial.ino'), 'utf8');
const tutorial = row(
  'tutorial, 8 sensors',
  await buildSketch([{ path: 'tutorial/tutorial.ino', text }], 'nano'),
  false,
);
for (const kind of ['pid', 'rules']) {
  const built = await image(eight(kind));
  const ours = row(`generated, ${kind}`, built, true);
  const harsh = measureSteps(built.program, harshReadings(SPAN.sensorCount), { ...SPAN, toS: 9 });
  const longest = meanAndMax(harsh.pwmCycles).max / CYCLES_PER_US;
  console.log(
    `  on readings that no line gives, ${harsh.steps} steps: sampled to PWM ${longest.toFixed(1)} max us`,
  );
  console.log(
    `  tutorial / generated: step ${(tutorial.step.mean / ours.step.mean).toFixed(1)} mean, ${(tutorial.step.max / ours.step.max).toFixed(1)} max;` +
      ` sampled to PWM ${(tutorial.pwm.mean / ours.pwm.mean).toFixed(1)} mean, ${(tutorial.pwm.max / ours.pwm.max).toFixed(1)} max`,
  );
}
const built = await image(demo);
const { flashBytes, ramBytes, stack, program } = built;
const seen = measureSteps(
  program,
  wanderingLine(demo.sensors.count),
  { ...SPAN, sensorCount: demo.sensors.count },
  ramBytes,
);
const used = ramBytes + stack.deepestBytes;
console.log(
  `demo sheet: flash ${flashBytes} bytes (limit 8192), RAM ${ramBytes} static + ${stack.deepestBytes} stack = ${used} bytes (limit 600), head-room ${2048 - used} of 2048`,
);
console.log(
  `  deepest stack, by the compiler: ${stack.chain.join(' > ')}, ${stack.deepestBytes - stack.interruptBytes} bytes, and on top of it the interrupt ${stack.interruptChain.join(' > ')}, ${stack.interruptBytes} bytes;` +
    ` by paint on the emulated chip: ${seen.stackBytes} bytes`,
);
