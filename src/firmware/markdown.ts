/**
 * The one place that writes text into Markdown, so that no text can become markup, a link, a table's border or HTML.
 *
 * CommonMark 0.31, "Backslash escapes": any ASCII punctuation may be escaped. Escaped is what can be active within a paragraph or
 * a table's cell, addresses that would become links included (GitHub Flavored Markdown, "Autolinks"); what is active only at the beginning of a line is not, as no text of a sheet stands there alone.
 */
import { inertText } from './comments.js';

/** The text on one line of printable ASCII that Markdown shows as it is. */
export function markdown(text: string): string {
  return inertText(text)
    .replace(/[`*_[\]<>|#&~!@]/g, (mark) => `\\${mark}`)
    .replace(/(?<=\bwww)\.|:(?=\/\/)/gi, (mark) => `\\${mark}`);
}
