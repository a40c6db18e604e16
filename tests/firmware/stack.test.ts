/**
 * RAM: static use and the deepest stack by the compiler's own figures leave head-room; paint on the emulated chip shows that the figures
 * bound what happens. On random sheets: tests/properties/render.test.ts.
 */
import { describe, expect, it } from 'vitest';
import { measureSteps, wanderingLine } from '../../bench/cost/measure.js';
import { renderFirmware } from '../../src/firmware/render.js';
import { type ChipImage, buildSketch } from '../../src/rehearsal/chip-build.js';
import { CARTS, SHEET, cart, quickDesign } from './cart.js';

const MOST_RAM_BYTES = 600;
/** On what happens to be the deepest way the figures allow for, nothing need be; but not much less either. */
const LEAST_SHARE = 0.6;

/** The sketch of a cart; the hook that runs in each sample with a body of its own. */
async function built(name: string, hook = '', before = ''): Promise<ChipImage> {
  const vehicle = cart(CARTS[name]);
  const files = (await renderFirmware(SHEET, quickDesign(vehicle))).map((file) => ({
    ...file,
    text: file.text.replace(
      'void userSample(const Steering&) {}',
      `${before}\nvoid userSample(const Steering&) { ${hook} }`,
    ),
  }));
  return buildSketch(files, vehicle.board.id);
}

describe('static use and the deepest stack', () => {
  it.each(Object.keys(CARTS))('take less than 600 bytes: %s', async (name) => {
    const { ramBytes, stack, program } = await built(name);
    expect(stack.chain[0]).toBe('main');
    expect(ramBytes + stack.deepestBytes).toBeLessThan(MOST_RAM_BYTES);
    if (CARTS[name]!['/sensors/kind'] === 'digital') return;
    const sensorCount = cart(CARTS[name]).bar.pins.length;
    const span = { sensorCount, fromS: 0.9, toS: 1.2 };
    const { stackBytes } = measureSteps(program, wanderingLine(sensorCount), span, ramBytes);
    expect(stackBytes).toBeLessThanOrEqual(stack.deepestBytes);
    expect(stackBytes).toBeGreaterThan(LEAST_SHARE * stack.deepestBytes);
  });
});

describe('the figure', () => {
  it('grows with what a function keeps', async () => {
    const plain = await built('the demo cart');
    const hook = 'volatile uint8_t kept[200]; kept[0] = 1; kept[199] = kept[0];';
    const { stack } = await built('the demo cart', hook);
    expect(stack.deepestBytes - plain.stack.deepestBytes).toBeGreaterThanOrEqual(200);
    expect(stack.deepestBytes - plain.stack.deepestBytes).toBeLessThan(230);
  });

  it('grows with an interrupt that lets others in', async () => {
    const plain = await built('the demo cart');
    const { stack } = await built(
      'the demo cart',
      '',
      '#include <avr/interrupt.h>\nISR(INT1_vect, ISR_NOBLOCK) {}',
    );
    expect(stack.interruptBytes).toBeGreaterThan(plain.stack.interruptBytes + 10);
  });

  it('is refused for a function that calls itself', async () => {
    const before =
      'volatile int depth;\n__attribute__((noinline)) int down(int n) { depth = n; return n > 0 ? down(n - 1) * depth + 1 : 0; }';
    await expect(built('the demo cart', 'depth = down(depth);', before)).rejects.toThrow(
      'down calls itself: its stack has no bound.',
    );
  });

  it('is refused for a store whose size is not known before', async () => {
    const before = 'volatile int size;';
    const hook = 'volatile char* place = static_cast<char*>(__builtin_alloca(size)); place[0] = 1;';
    await expect(built('the demo cart', hook, before)).rejects.toThrow(
      /The stack of \w+ has no bound: dynamic/,
    );
  });
});
