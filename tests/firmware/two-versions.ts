/** Two versions of a small firmware, as rendered files. */
import type { RenderedFile } from '../../src/firmware/render.js';

export const OLD = { digest: 'a'.repeat(64) };
export const NEW = { digest: 'b'.repeat(64) };

export const tool = (name: string, text: string): RenderedFile => ({
  path: `cart/${name}`,
  text,
  owner: 'tool',
});
const hooks: RenderedFile = { path: 'cart/user_hooks.cpp', text: 'void userSetup() {}\n', owner: 'user' };
export const VERSION_1 = [tool('a.h', 'one\n'), tool('b.cpp', 'one\ntwo\n'), tool('gone.h', 'x\n'), hooks];
export const VERSION_2 = [
  tool('a.h', 'one\n'),
  tool('b.cpp', 'one\nTWO\nthree\n'),
  tool('new.h', 'y\n'),
  hooks,
];
