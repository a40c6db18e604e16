/** How values appear in messages. */

const MAX_QUOTED = 60;

/** Text from outside in double quotes, escaped as in JSON, cut to a readable length. */
export function quote(text: string): string {
  // The cut may not fall inside a surrogate pair.
  const start = text.slice(0, MAX_QUOTED).replace(/[\ud800-\udbff]$/, '');
  return JSON.stringify(start.length < text.length ? `${start}...` : text);
}

/** A number for a message: whole numbers as they are, others to at most four significant digits. */
export function rounded(value: number): string {
  return Number.isInteger(value) ? String(value) : String(Number(value.toPrecision(4)));
}

/** A number with its unit; "1" stands for none. */
export function withUnit(value: number, unit: string | undefined): string {
  return unit === undefined || unit === '1' ? rounded(value) : `${rounded(value)} ${unit}`;
}

/** What a value is, in words: numbers with their unit, text in quotes, the rest by kind. */
export function describeValue(value: unknown, unit?: string): string {
  if (typeof value === 'number')
    return unit === undefined || unit === '1' ? String(value) : `${String(value)} ${unit}`;
  if (typeof value === 'string') return quote(value);
  if (Array.isArray(value))
    return value.length === 1 ? 'a list of 1 entry' : `a list of ${value.length} entries`;
  if (typeof value === 'object' && value !== null) return 'an object';
  return String(value);
}

/** "a, b or c". */
export function joinOr(words: readonly string[]): string {
  return joinWith(words, 'or');
}

/** "a, b and c". */
export function joinAnd(words: readonly string[]): string {
  return joinWith(words, 'and');
}

function joinWith(words: readonly string[], last: string): string {
  if (words.length < 2) return words.join('');
  return `${words.slice(0, -1).join(', ')} ${last} ${words.at(-1)}`;
}

/** JSON pointer (RFC 6901) from its parts. */
export function pointerTo(...parts: readonly (string | number)[]): string {
  return parts.map((part) => `/${String(part).replaceAll('~', '~0').replaceAll('/', '~1')}`).join('');
}

/** "1 sensor", "6 sensors". */
export function counted(count: number, noun: string): string {
  return `${count} ${noun}${count === 1 ? '' : 's'}`;
}

/**
 * Makes text from a file safe and visible in one line: control characters, line ends, and the characters that
 * reorder text (Unicode TR36, bidirectional controls) become escapes such as \u{1b}.
 */
export function visible(text: string): string {
  return text.replace(
    /[\p{Cc}\p{Cs}\p{Zl}\p{Zp}\u061c\u200e\u200f\u202a-\u202e\u2066-\u2069]/gu,
    (character) => {
      return `\\u{${(character.codePointAt(0) ?? 0).toString(16)}}`;
    },
  );
}
