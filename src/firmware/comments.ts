/**
 * The one place that writes text into a comment of emitted code, so that no text can end its comment.
 *
 * Text of the sheet is data: it may hold an end-of-comment mark, a backslash at the end of a line (C++ joins the next
 * line to the comment: [lex.phases]), a trigraph, a line end, characters that reorder what a reader sees, or a Python
 * encoding declaration (PEP 263). Characters outside printable ASCII become <U+XXXX>, so does the backslash;
 * the rest is split by a space. The words stay readable; nothing of them remains active.
 */
import type { Language } from './literals.js';

const PREFIX: Readonly<Record<Language, string>> = { cpp: '//', python: '#' };

/** Widest comment line; four columns less than the formatters' line, for indented comments. */
const WIDTH = 96;

function escapeCharacter(character: string): string {
  const code = character.codePointAt(0) ?? 0;
  return `<U+${code.toString(16).toUpperCase().padStart(4, '0')}>`;
}

/** The text in one line of printable ASCII that is inert in C++ and Python comments. */
export function inertText(text: string): string {
  return text
    .replace(/[^\x20-\x5b\x5d-\x7e]/gu, escapeCharacter)
    .replace(/\*(?=\/)|\/(?=\*)|\?(?=\?)|(["'])(?=\1\1)|(?<=coding)(?=[:=])/g, (mark) => `${mark} `);
}

/**
 * Comment lines for a paragraph, wrapped at word ends; an empty paragraph gives one empty comment line.
 *
 * @param text any text, user text included
 */
export function comment(text: string, language: Language): string {
  const prefix = PREFIX[language];
  const lines: string[] = [];
  let line = prefix;
  for (const word of inertText(text).split(' ')) {
    if (line.length + 1 + word.length > WIDTH && line !== prefix) {
      lines.push(line);
      line = prefix;
    }
    if (word !== '') line += ` ${word}`;
  }
  lines.push(line);
  return lines.join('\n');
}
