/**
 * Where a JSON text goes wrong: line and column of the first error, and keys that stand twice in one object.
 *
 * The grammar is RFC 8259. JSON.parse gives no dependable position and keeps the last of two equal keys silently, which in
 * a hand-written sheet is always a mistake. Nesting is bounded so that hostile input cannot exhaust the stack.
 */
import { quote } from './words.js';

/** The first fault of a JSON text. */
export interface JsonFault {
  /** Offset in UTF-16 units. */
  offset: number;
  /** Counted from 1. */
  line: number;
  /** Counted from 1, in UTF-16 units. */
  column: number;
  /** One clause: what is wrong there. */
  what: string;
}

const MAX_DEPTH = 64;
const NUMBER = /-?(?:0|[1-9]\d*)(?:\.\d+)?(?:[eE][+-]?\d+)?/y;
// Any character from the space on, but for quote and backslash; escapes between them.
const STRING = /"[ !#-[\]-\uffff]*(?:\\(?:["\\/bfnrt]|u[0-9a-fA-F]{4})[ !#-[\]-\uffff]*)*"/y;
const WORD = /true|false|null/y;
const BLANK = /[ \t\n\r]*/y;

class Fault extends Error {
  constructor(
    readonly offset: number,
    readonly what: string,
  ) {
    super(what);
  }
}

/** The first fault in `text`, or undefined if it is one JSON value without repeated keys. */
export function findJsonFault(text: string): JsonFault | undefined {
  try {
    const scanner = new Scanner(text);
    scanner.value(0);
    scanner.end();
    return undefined;
  } catch (error) {
    if (!(error instanceof Fault)) throw error;
    const before = text.slice(0, error.offset);
    const line = before.split('\n').length;
    const column = error.offset - before.lastIndexOf('\n');
    return { offset: error.offset, line, column, what: error.what };
  }
}

class Scanner {
  private at = 0;

  constructor(private readonly text: string) {}

  value(depth: number): void {
    this.blank();
    if (depth > MAX_DEPTH) throw new Fault(this.at, `nesting is deeper than ${MAX_DEPTH} levels`);
    const next = this.text[this.at];
    if (next === '{') this.object(depth);
    else if (next === '[') this.list(depth);
    else if (next === '"') this.string('text');
    else if (this.take(NUMBER) === undefined && this.take(WORD) === undefined) this.fail('a value');
    this.blank();
  }

  end(): void {
    if (this.at < this.text.length) this.fail('the end of the file');
  }

  private object(depth: number): void {
    const seen = new Set<string>();
    this.at += 1;
    this.blank();
    if (this.skip('}')) return;
    for (;;) {
      this.blank();
      const keyAt = this.at;
      const key = String(JSON.parse(this.string('a key in double quotes')));
      if (seen.has(key)) throw new Fault(keyAt, `the key ${quote(key)} stands here a second time`);
      seen.add(key);
      this.blank();
      if (!this.skip(':')) this.fail('":" after the key');
      this.value(depth + 1);
      if (this.skip('}')) return;
      if (!this.skip(',')) this.fail('"," or "}"');
    }
  }

  private list(depth: number): void {
    this.at += 1;
    this.blank();
    if (this.skip(']')) return;
    for (;;) {
      this.value(depth + 1);
      if (this.skip(']')) return;
      if (!this.skip(',')) this.fail('"," or "]"');
    }
  }

  private string(expected: string): string {
    const found = this.take(STRING);
    if (found !== undefined) return found;
    if (this.text[this.at] !== '"') this.fail(expected);
    throw new Fault(
      this.at,
      'this text has no closing quote on its line, or a wrong escape or control character in it',
    );
  }

  private blank(): void {
    this.take(BLANK);
  }

  private skip(character: string): boolean {
    if (this.text[this.at] !== character) return false;
    this.at += 1;
    return true;
  }

  private take(pattern: RegExp): string | undefined {
    pattern.lastIndex = this.at;
    const found = pattern.exec(this.text)?.[0];
    if (found !== undefined) this.at += found.length;
    return found;
  }

  private fail(expected: string): never {
    const next = this.text.codePointAt(this.at);
    const found = next === undefined ? 'the file ends here' : `found ${quote(String.fromCodePoint(next))}`;
    throw new Fault(this.at, `${found} where ${expected} should be`);
  }
}
