/** The few pieces of SVG that the plots are written with: numbers, escaped text, elements. */

/** A coordinate in at most one decimal, without a negative zero. */
export function coordinate(value: number): string {
  return String(Math.round(value * 10) / 10 + 0);
}

/** Text for content and attributes. Characters that XML 1.0 does not allow are dropped. */
export function escaped(text: string): string {
  const replacements: Readonly<Record<string, string>> = {
    '&': '&amp;',
    '<': '&lt;',
    '>': '&gt;',
    '"': '&quot;',
  };
  return text
    .replace(/[^\t\n\r\u0020-\ud7ff\ue000-\ufffd\u{10000}-\u{10ffff}]/gu, '')
    .replace(/[&<>"]/g, (character) => replacements[character] ?? '');
}

export type Attributes = Readonly<Record<string, string | number>>;

/** One element; numbers are written as coordinates, content must be SVG already. */
export function element(name: string, attributes: Attributes, content?: string): string {
  const written = Object.entries(attributes).map(([key, value]) => {
    return ` ${key}="${typeof value === 'number' ? coordinate(value) : escaped(value)}"`;
  });
  return content === undefined
    ? `<${name}${written.join('')}/>`
    : `<${name}${written.join('')}>${content}</${name}>`;
}

export function textAt(x: number, y: number, text: string, attributes: Attributes = {}): string {
  return element('text', { x, y, ...attributes }, escaped(text));
}

/** Path data through points. */
export function pathThrough(points: readonly (readonly [x: number, y: number])[]): string {
  return points.map(([x, y], i) => `${i === 0 ? 'M' : 'L'}${coordinate(x)} ${coordinate(y)}`).join('');
}
