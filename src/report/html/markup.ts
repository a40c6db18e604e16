/** The one way of text into the report's HTML: everything from outside goes through `text`; tables and lists do so themselves. */
import { visible } from '../../sheet/words.js';

const ENTITIES: Readonly<Record<string, string>> = {
  '&': '&amp;',
  '<': '&lt;',
  '>': '&gt;',
  '"': '&quot;',
  "'": '&#39;',
};

/** Text for content and quoted attributes, in one line: control and reordering characters are made visible. */
export function text(words: string | number): string {
  return visible(String(words)).replace(/[&<>"']/g, (character) => ENTITIES[character] ?? '');
}

/** The same line by line, line ends kept. */
export function lines(words: string): string {
  return words
    .split(/\r\n|\n|\r/)
    .map(text)
    .join('\n');
}

/** HTML from a template: strings and numbers put in are escaped, HTML is taken as it is, lists are joined. */
export function markup(parts: TemplateStringsArray, ...values: readonly (Safe | readonly Safe[])[]): string {
  const written = values.map((value) =>
    Array.isArray(value) ? value.map(safe).join('\n') : safe(value as Safe),
  );
  return parts.map((part, i) => part + (written[i] ?? '')).join('');
}

/** HTML wrapped, so that `markup` can tell it from text. */
export class Raw {
  constructor(readonly source: string) {}
}

type Safe = string | number | Raw;

function safe(value: Safe): string {
  return value instanceof Raw ? value.source : text(value);
}

/** What is HTML or SVG already, for `markup`. */
export function raw(source: string): Raw {
  return new Raw(source);
}

/** An element whose content keeps every space; templates above may be laid out anew by the formatter. */
export function exactly(tag: 'style' | 'script' | 'pre', content: Raw, label?: string): Raw {
  const region = tag === 'pre' ? ` tabindex="0" role="region" aria-label="${text(label ?? 'Text')}"` : '';
  return raw(`<${tag}${region}>${content.source}</${tag}>`);
}

/** A table with a caption; the first cell of a row is its head. Wide ones scroll by themselves. */
export function tableOf(
  caption: string,
  head: readonly string[],
  rows: readonly (readonly (string | number)[])[],
): Raw {
  const heads = head.map((cell) => raw(markup`<th scope="col">${cell}</th>`));
  const body = rows.map((row) => {
    const cells = row.map((cell, i) =>
      raw(i === 0 ? markup`<th scope="row">${cell}</th>` : markup`<td>${cell}</td>`),
    );
    return raw(
      markup`<tr>
        ${cells}
      </tr>`,
    );
  });
  return raw(
    markup`<div class="scroll" tabindex="0" role="region" aria-label="${caption}">
      <table>
        <caption>
          ${caption}
        </caption>
        <thead>
          <tr>
            ${heads}
          </tr>
        </thead>
        <tbody>
          ${body}
        </tbody>
      </table>
    </div>`,
  );
}

/** Something that may be opened. */
export function details(summary: string, content: Raw): Raw {
  return raw(
    markup`<details>
      <summary>${summary}</summary>
      ${content}
    </details>`,
  );
}
