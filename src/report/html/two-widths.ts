/** Every plot is drawn twice, for a broad page and for a telephone; the style sheet shows one. So words stay legible in both. */
import { raw, type Raw } from './markup.js';

/** px */
export const BROAD = 900;
export const SLIM = 328;

export function inTwoWidths(draw: (width: number) => string): Raw {
  return raw(`<div class="broad">${draw(BROAD)}</div><div class="slim">${draw(SLIM)}</div>`);
}
