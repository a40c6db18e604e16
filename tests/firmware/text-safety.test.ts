/** Hostile text in each place that text is written to, read back by that place's own parser: it is what it was, and nothing else. */
import { execFileSync } from 'node:child_process';
import { readFileSync, readdirSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { load } from 'js-yaml';
import { type Token, type Tokens, lexer } from 'marked';
import { type DefaultTreeAdapterTypes as Tree, parseFragment } from 'parse5';
import { describe, expect, it } from 'vitest';
import { comment, inertText } from '../../src/firmware/comments.js';
import { fileName } from '../../src/firmware/identifiers.js';
import { markdown } from '../../src/firmware/markdown.js';
import { type FirmwareDesign, renderFirmware } from '../../src/firmware/render.js';
import { text as htmlText } from '../../src/report/html/markup.js';
import { shellWord } from '../../src/report/shell-word.js';
import { escaped } from '../../src/report/svg-text.js';
import { visible } from '../../src/sheet/words.js';
import { CARTS, SHEET, cart, quickDesign } from './cart.js';
import { HOSTILE } from './hostile-texts.js';
import { MICROPYTHON_CARTS } from './micropython-carts.js';

const oneSpace = (text: string): string => text.replaceAll(/ +/g, ' ').trim();

/** Text of Markdown tokens that are text and nothing else. */
function plainText(tokens: readonly Token[]): string {
  return tokens
    .map((token) => {
      expect(['text', 'escape']).toContain(token.type);
      return (token as Tokens.Text).text;
    })
    .join('');
}

describe('Markdown', () => {
  it.each(HOSTILE)('keeps %j in its cell', (given) => {
    const tokens = lexer(`| a | b |\n| --- | --- |\n| x | ${markdown(given)} |\n\nafter\n`);
    expect(tokens.map(({ type }) => type)).toEqual(['table', 'space', 'paragraph']);
    const [row] = (tokens[0] as Tokens.Table).rows;
    expect(row).toHaveLength(2);
    expect(plainText(row![1]!.tokens)).toBe(oneSpace(inertText(given)));
  });

  it.each(HOSTILE)('keeps %j in its paragraph', (given) => {
    const tokens = lexer(`Name: ${markdown(given)}\n`);
    expect(tokens.map(({ type }) => type)).toEqual(['paragraph']);
    const text = plainText((tokens[0] as Tokens.Paragraph).tokens);
    expect(oneSpace(text)).toBe(oneSpace(`Name: ${inertText(given)}`));
  });
});

describe('HTML', () => {
  it.each(HOSTILE)('keeps %j in its element and its attribute', (given) => {
    const written = htmlText(given);
    const { childNodes } = parseFragment(`<p title="${written}">${written}</p>`);
    const [p, ...others] = childNodes as Tree.Element[];
    expect(others).toEqual([]);
    expect(p!.attrs).toEqual([{ name: 'title', value: visible(given) }]);
    expect(p!.childNodes.map((node) => (node as Tree.TextNode).value).join('')).toBe(visible(given));
  });
});

it('SVG keeps each text in its element and its attribute, for an XML parser', () => {
  const texts = HOSTILE.map((text) => `<text a="${escaped(text)}">${escaped(text)}</text>`);
  const script = `import json, sys, xml.etree.ElementTree as tree
print(json.dumps([[each.tag, each.get("a"), each.text or "", len(each)] for each in tree.fromstring(sys.stdin.buffer.read())]))`;
  const svg = `<svg>${texts.join('')}</svg>`;
  const said = JSON.parse(execFileSync('python3', ['-c', script], { input: svg }).toString()) as unknown[];
  // characters that XML does not know are dropped, line ends read as one kind, in attributes as spaces
  const kept = HOSTILE.map((text) =>
    text.replace(/[^\t\n\r\u0020-\ud7ff\ue000-\ufffd\u{10000}-\u{10ffff}]/gu, '').replaceAll(/\r\n?/g, '\n'),
  );
  expect(said).toEqual(kept.map((text) => ['text', text.replaceAll(/[\n\t]/g, ' '), text, 0]));
});

it('YAML: a comment stays one', () => {
  const source = HOSTILE.map((text, i) => `${comment(text, 'python')}\nkey${i}: ${i}`).join('\n');
  expect(load(source)).toEqual(Object.fromEntries(HOSTILE.map((_, i) => [`key${i}`, i])));
});

it('a shell takes each word for one, and as it is', () => {
  const words = HOSTILE.filter((word) => !/\0|[\ud800-\udfff](?![\udc00-\udfff])/u.test(word));
  expect(words.length).toBeGreaterThan(25);
  const said = execFileSync('sh', ['-c', `printf '%s\\0' ${words.map(shellWord).join(' ')}`]).toString();
  expect(said.split('\0').slice(0, -1)).toEqual(words);
});

describe('file names', () => {
  const devices = ['CON', 'con', 'prn', 'AUX', 'nul', 'Com1', 'LPT9'];
  it.each([
    ...HOSTILE.filter((text) => !/^x+$/.test(text)),
    ...devices,
    '.',
    '..',
    'a/b',
    'a.b',
    'x'.repeat(41),
  ])('refuse %j', (given) => {
    expect(() => fileName(given)).toThrow(/cannot name a folder/);
  });
});

/** The design with the names of its classes replaced, past the schema that would refuse them. */
function renamed(design: FirmwareDesign, names: readonly string[]): FirmwareDesign {
  const { controller, vehicle } = design;
  const classes = controller.classes.map((each, i) => ({ ...each, name: names[i % names.length]! }));
  const given = vehicle.speeds.classes;
  const speeds =
    given === 'auto'
      ? vehicle.speeds
      : { ...vehicle.speeds, classes: given.map((each, i) => ({ ...each, name: names[i % names.length]! })) };
  return { ...design, vehicle: { ...vehicle, speeds }, controller: { ...controller, classes } };
}

describe('hostile class names leave the code as it is', () => {
  const bare = (text: string, isPython: boolean): string =>
    isPython
      ? execFileSync(
          'python3',
          ['-c', 'import ast, sys; print(ast.dump(ast.parse(sys.stdin.buffer.read())))'],
          { input: text },
        ).toString()
      : execFileSync('g++', ['-fpreprocessed', '-trigraphs', '-E', '-P', '-x', 'c++', '-'], {
          input: text,
        }).toString();

  it.each([
    ['C++', Object.values(CARTS)[0]!, 'constants.h'],
    ['Python', Object.values(MICROPYTHON_CARTS)[0]!, 'constants.py'],
  ])('%s', async (language, changes, name) => {
    const design = quickDesign(cart(changes));
    const codeWith = async (names: readonly string[]): Promise<[text: string, code: string]> => {
      const files = await renderFirmware(SHEET, renamed(design, names));
      const { text } = files.find(({ path }) => path.endsWith(name))!;
      return [text, bare(text, language === 'Python')];
    };
    const [, plain] = await codeWith(['plain']);
    for (let i = 0; i < HOSTILE.length; i += 3) {
      const [text, code] = await codeWith(HOSTILE.slice(i, i + 3));
      expect(text).toContain(inertText(HOSTILE[i]!).slice(0, 12).trim());
      expect(code).toBe(plain);
    }
  });
});

describe('there is no other way in', () => {
  const src = fileURLToPath(new URL('../../src/', import.meta.url));
  const sources = readdirSync(src, { recursive: true, encoding: 'utf8' })
    .filter((file) => file.endsWith('.ts'))
    .map((file) => ({ file: file.replaceAll('\\', '/'), text: readFileSync(`${src}/${file}`, 'utf8') }));
  const having = (pattern: RegExp) =>
    sources
      .filter(({ text }) => pattern.test(text))
      .map(({ file }) => file)
      .sort();

  it('templates are filled in one place, which gives them three helpers', () => {
    expect(having(/handlebars/i)).toEqual(['firmware/render.ts']);
    const { text } = sources.find(({ file }) => file === 'firmware/render.ts')!;
    expect([...text.matchAll(/engine\.registerHelper\('(\w+)'/g)].map(([, name]) => name)).toEqual([
      'literal',
      'comment',
      'markdown',
    ]);
  });

  it('no template takes a value past the helpers but names of code', () => {
    const templates = fileURLToPath(new URL('../../templates/', import.meta.url));
    const files = readdirSync(templates, { recursive: true, encoding: 'utf8' }).filter((file) =>
      file.endsWith('.hbs'),
    );
    expect(files.length).toBeGreaterThan(40);
    for (const file of files)
      expect(readFileSync(`${templates}/${file}`, 'utf8'), file).not.toMatch(/\{\{\{|\{\{&|\{\{>/);
  });

  it('text is made inert in one place, and HTML is written by `markup`', () => {
    expect(having(/\binertText\(/)).toEqual(['firmware/comments.ts', 'firmware/markdown.ts']);
    const html = sources.filter(
      ({ file }) => file.startsWith('report/html/') && !file.endsWith('/markup.ts'),
    );
    const loose = html
      .filter(({ text }) => /(?<!markup|svg)`\s*<[a-z!][^`]*\$\{/.test(text))
      .map(({ file }) => file);
    // SVG of coordinates, constants and finished elements: no text
    expect(loose).toEqual(['report/html/plot.ts', 'report/html/run-section.ts', 'report/html/two-widths.ts']);
  });
});
