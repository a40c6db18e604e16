import { mkdirSync, writeFileSync } from 'node:fs';
import { expect, test } from 'vitest';
import { renderFirmware } from '../../src/firmware/render.js';
import { intermediateBounds } from '../../src/design/intervals.js';
import { SHEET, cart, quickDesign } from './cart.js';
import { MICROPYTHON_CARTS } from './micropython-carts.js';
test.each(Object.keys(MICROPYTHON_CARTS))('%s', async (name) => {
  const design = quickDesign(cart(MICROPYTHON_CARTS[name]));
  console.log(
    name,
    intermediateBounds(design.controller, 4095)
      .filter((b) => b.magnitude > 2 ** 29)
      .map((b) => `${b.name} ${(b.magnitude / 2 ** 30).toFixed(2)}`)
      .join('; '),
  );
  try {
    const files = await renderFirmware(SHEET, design);
    const dir = `/tmp/mpy/out/${name.replace(/[^a-z0-9]+/g, '-')}`;
    mkdirSync(dir, { recursive: true });
    for (const f of files) writeFileSync(`${dir}/${f.path.split('/').pop()}`, f.text);
  } catch (e) {
    console.log(String(e).slice(0, 600));
  }
  expect(1).toBe(1);
});
