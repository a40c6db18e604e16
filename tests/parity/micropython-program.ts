/** Runs the emitted control law in the MicroPython interpreter on given readings. */
import type { RenderedFile } from '../../src/firmware/render.js';
import { type Interpreter, withInterpreter } from '../../src/rehearsal/micropython-interpreter.js';
import { FIELDS } from './reference.js';

/** The modules that are pure arithmetic. */
const PURE = /^(constants|rule_table|sensing|steering|wheel_loop|calibration|sweep)\.py$/;

/** Takes the same input as the C++ harness, and gives the same output. The heap is locked in each step. */
const HARNESS = (sweep: boolean, encoders: boolean) => `
import sys
sys.path.insert(0, "/program")
from array import array
from micropython import heap_lock, heap_unlock
from _trace import next, put
from constants import SENSOR_COUNT
from steering import Steering

counts = array("h", bytes(2 * SENSOR_COUNT))
steering = Steering()
sensing = steering.sensing


def read_counts():
    for i in range(SENSOR_COUNT):
        counts[i] = next()

${sweep ? SWEEP : ''}
def step():
    heap_lock()
    try:
        steering.step(counts)
    finally:
        heap_unlock()
    put(steering.phase)
    put(steering.class_index)
    put(sensing.offset_mm_q6)
    put(steering.curvature_per_m_q8)
    put(steering.speed_q29)
    put(steering.duty_left_q12)
    put(steering.duty_right_q12)
    put(${encoders ? 'int(steering.wheel_blocked())' : '0'})


steps = next()
restart_every = next()
for i in range(steps):
    if i % restart_every == 0:
        steering.start()
    read_counts()
${encoders ? '    steering.count_edges(next(), next())\n' : ''}    step()
`;

const SWEEP = `
from calibration import Calibration

calibration = Calibration()
calibration.start()
for _ in range(next()):
    read_counts()
    calibration.observe(counts)
put(calibration.finish(sensing.ground_counts, sensing.coverage_255ths_per_count_q12))
for value in sensing.ground_counts:
    put(value)
for value in sensing.coverage_255ths_per_count_q12:
    put(value)
`;

/**
 * @param input as reference() makes it
 * @param outputLength how many numbers are expected
 */
export function runInMicroPython(
  files: readonly RenderedFile[],
  input: Int32Array,
  outputLength: number,
): Promise<Int32Array> {
  const modules = files.map(({ path, text }) => ({ path: path.slice(path.indexOf('/') + 1), text }));
  const pure = modules.filter(({ path }) => PURE.test(path));
  return withInterpreter((interpreter: Interpreter) => {
    const output = new Int32Array(outputLength + FIELDS.length);
    let taken = 0;
    let given = 0;
    interpreter.registerModule('_trace', {
      next: () => input[taken++],
      put: (value: number) => {
        output[given++] = value;
      },
    });
    interpreter.writeFiles('/program', pure);
    const has = (module: string) => pure.some(({ path }) => path === module);
    interpreter.run(HARNESS(has('calibration.py'), has('wheel_loop.py')));
    return output.subarray(0, given);
  });
}
