import { describe, expect, it } from 'vitest';
import { Facts } from '../../src/survey/facts.js';
import { KEY, questionOf, show } from './prompt-helpers.js';

const board = questionOf('/target/board');
const kind = questionOf('/sensors/kind');

describe('the prompt for a choice', () => {
  it('shows every choice with its meaning, and the way back', async () => {
    const { answer, press, getScreen } = await show(kind);
    expect(getScreen()).toBe(
      [
        'Sensor kind',
        '  Analog sensors place the line between two sensors and so steer more finely.',
        '> 1 analog: a voltage that follows the reflection',
        '  2 digital: one level over line, the other over ground',
        '  3 mixed: some of each, as kinds lists them',
        '  4 back: the question before',
        'arrows or number, then Enter, ?: more, <: back',
      ].join('\n'),
    );
    press(KEY.enter);
    await expect(answer).resolves.toEqual({ kind: 'answer', value: 'analog' });
    expect(getScreen()).toBe('Sensor kind: analog');
  });

  it.each([
    ['arrows', [KEY.down, KEY.down, KEY.up], 'nano'],
    ['round the end', [KEY.up, KEY.up], 'esp32'],
    ['a number', ['5'], 'pico'],
    ['the first letter', ['p'], 'pico'],
    ['a word', ['nano'], 'nano'],
    ['a number after another', ['5', '6'], 'esp32'],
    ['a key that means nothing', ['x'], 'uno'],
  ])('is moved by %s', async (_how, keys, value) => {
    const { answer, press } = await show(board);
    press(...keys, KEY.enter);
    await expect(answer).resolves.toEqual({ kind: 'answer', value });
  });

  it.each([
    ['<', ['<']],
    ['the last choice', [KEY.up, KEY.enter]],
    ['the word', ['back', KEY.enter]],
  ])('goes back by %s', async (_how, keys) => {
    const { answer, press, getScreen } = await show(kind);
    press(...keys);
    await expect(answer).resolves.toEqual({ kind: 'back' });
    expect(getScreen()).toBe('Sensor kind: (back)');
  });

  it('offers no way back from the first question', async () => {
    const { answer, press, getScreen } = await show(kind, { canGoBack: false });
    expect(getScreen()).not.toContain('back');
    press('<', KEY.enter);
    await expect(answer).resolves.toEqual({ kind: 'answer', value: 'analog' });
  });

  it('explains on ?, at once', async () => {
    const { answer, press, getScreen } = await show(board);
    expect(getScreen()).not.toContain('MicroPython');
    press('?');
    expect(getScreen()).toContain(
      '  The controller board: uno, nano, mega2560 and leonardo take Arduino C++, pico\n  and esp32 take MicroPython.\n',
    );
    press('p', KEY.enter);
    await expect(answer).resolves.toEqual({ kind: 'answer', value: 'pico' });
  });

  it('begins at the answer given before', async () => {
    const facts = new Facts({}, { '/sensors/kind': 'digital' });
    const { answer, press } = await show(questionOf('/sensors/kind', facts));
    press(KEY.enter);
    await expect(answer).resolves.toEqual({ kind: 'answer', value: 'digital' });
  });

  it('shows the plan of pins and what it is for', async () => {
    const { answer, press, getScreen } = await show(questionOf('#pins'));
    expect(getScreen()).toContain('  Sensor pins, left to right: A0 A1 A2 A3 A4 A5\n');
    expect(getScreen()).toMatch(/ {2}Left motor: PWM pin 9, First input \d+, Second input \d+\n/);
    press(KEY.enter);
    await expect(answer).resolves.toEqual({ kind: 'answer', value: 'proposed' });
  });

  it('fits into 40 columns', async () => {
    for (const id of ['/target/board', '/drive/driver/scheme', '#pins', '/sensors/calibration/mode']) {
      const { answer, press, getScreen } = await show(questionOf(id), { columns: 40 });
      press('?');
      const widths = getScreen()
        .split('\n')
        .map((line) => line.length);
      expect(Math.max(...widths), id).toBeLessThan(40);
      press(KEY.enter);
      await answer;
    }
  });

  it('ends with the input', async () => {
    const { answer, end } = await show(kind);
    end();
    await expect(answer).resolves.toEqual({ kind: 'closed' });
  });
});
