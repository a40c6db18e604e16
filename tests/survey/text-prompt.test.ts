import { describe, expect, it } from 'vitest';
import { KEY, questionOf, show } from './prompt-helpers.js';

const pitch = questionOf('/sensors/pitchMm');

describe('the prompt for a value', () => {
  it('says what, why, the limits, and what Enter does', async () => {
    const { getScreen, press, answer } = await show(pitch);
    expect(getScreen()).toBe(
      [
        'Sensor spacing, 3 to 30 mm',
        '  It decides whether the line can hide between two sensors.',
        '>',
        'Enter: 10 mm, ?: more, <: back',
      ].join('\n'),
    );
    press(KEY.enter);
    await answer;
  });

  it('takes the default on Enter and leaves one line', async () => {
    const { answer, press, getScreen } = await show(pitch);
    press(KEY.enter);
    await expect(answer).resolves.toEqual({ kind: 'answer', value: 10 });
    expect(getScreen()).toBe('Sensor spacing: 10 mm');
  });

  it('takes a value with a unit, and shows it in the unit of the sheet', async () => {
    const { answer, press, getScreen } = await show(pitch);
    press('1.2 cm');
    expect(getScreen()).toContain('> 1.2 cm');
    press(KEY.enter);
    await expect(answer).resolves.toEqual({ kind: 'answer', value: 12 });
    expect(getScreen()).toBe('Sensor spacing: 12 mm');
  });

  it('refuses a value out of limits, says what is allowed, and leaves it to be put right', async () => {
    const { answer, press, getScreen } = await show(pitch);
    press('95', KEY.enter);
    expect(getScreen()).toContain(
      [
        '> 95',
        '! 95 mm is outside 3 to 30 mm. Measure centre to centre between neighbouring',
        '  sensors.',
      ].join('\n'),
    );
    press('e-1');
    expect(getScreen()).toContain('> 95e-1');
    expect(getScreen()).not.toContain('!');
    press(KEY.enter);
    await expect(answer).resolves.toEqual({ kind: 'answer', value: 9.5 });
  });

  it('takes nothing from a refused value that was wiped out', async () => {
    const { answer, press } = await show(pitch);
    press('95', KEY.enter, KEY.ctrlU, KEY.enter);
    await expect(answer).resolves.toEqual({ kind: 'answer', value: 10 });
  });

  it('explains on ?', async () => {
    const { answer, press, getScreen } = await show(pitch);
    press('?', KEY.enter);
    expect(getScreen()).toContain(
      [
        '  Centre to centre between neighbouring sensors of an evenly spaced row.',
        '  Measure centre to centre between neighbouring sensors.',
        '  Allowed: 3 to 30 mm. Default: 10 mm.',
        '>',
      ].join('\n'),
    );
    press('9', KEY.enter);
    await expect(answer).resolves.toEqual({ kind: 'answer', value: 9 });
  });

  it.each(['<', 'back', 'BACK'])('goes back on %s', async (word) => {
    const { answer, press, getScreen } = await show(pitch);
    press(word, KEY.enter);
    await expect(answer).resolves.toEqual({ kind: 'back' });
    expect(getScreen()).toBe('Sensor spacing: (back)');
  });

  it('says so where there is nothing to go back to', async () => {
    const { answer, press, getScreen } = await show(questionOf('/name'), { canGoBack: false });
    expect(getScreen()).not.toContain('<: back');
    press('<', KEY.enter);
    expect(getScreen()).toContain('! This is the first question.');
    press(KEY.enter);
    await expect(answer).resolves.toEqual({ kind: 'answer', value: 'tray-cart' });
  });

  it('puts the default into the line on Tab', async () => {
    const { answer, press, getScreen } = await show(questionOf('/name'));
    press(KEY.tab, '-2');
    expect(getScreen()).toContain('> tray-cart-2');
    press(KEY.enter);
    await expect(answer).resolves.toEqual({ kind: 'answer', value: 'tray-cart-2' });
  });

  it('refuses a default that is none, as of a faulty sheet', async () => {
    const { answer, press, getScreen } = await show({ ...pitch, defaultValue: 95 });
    press(KEY.enter);
    expect(getScreen()).toContain('! 95 mm is outside 3 to 30 mm.');
    press('10', KEY.enter);
    await expect(answer).resolves.toEqual({ kind: 'answer', value: 10 });
  });

  it('fits into 40 columns without breaking words', async () => {
    const { answer, press, getScreen } = await show(questionOf('/drive/motor/timeConstantMs'), {
      columns: 40,
    });
    press('?', KEY.enter, '5 h', KEY.enter);
    const lines = getScreen().split('\n');
    expect(Math.max(...lines.map((line) => line.length))).toBeLessThan(40);
    expect(lines.slice(0, 4)).toEqual([
      'Motor time constant, 5 to 1000 ms',
      '  It is the main lag in the steering',
      '  loop and limits how stiff the',
      '  steering can be.',
    ]);
    press(KEY.ctrlU, KEY.enter);
    await answer;
  });

  it('ends with the input instead of waiting for ever', async () => {
    const { answer, end } = await show(pitch);
    end();
    await expect(answer).resolves.toEqual({ kind: 'closed' });
  });

  it('ends with Ctrl-C as inquirer reports it', async () => {
    const { answer, press } = await show(pitch);
    press(KEY.ctrlC);
    await expect(answer).rejects.toMatchObject({ name: 'ExitPromptError' });
  });
});
