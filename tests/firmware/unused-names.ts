/**
 * Names that emitted code defines and nothing of it uses, and includes and imports that bring nothing: what a vehicle does not need must not be
 * in its firmware.
 *
 * By words, comments and texts left out. A C++ function counts as used when it is named beside its declaration and its definition; a name
 * that the hooks are handed (user_hooks) is the user's to use.
 */
import { basename } from 'node:path';

interface SourceFile {
  path: string;
  text: string;
}

/** What each header of compiler and core is included for. */
const SYSTEM_HEADERS: Readonly<Record<string, RegExp>> = {
  'Arduino.h': /\b(u?int(8|16)_t|pinMode|digitalWrite|HIGH|LOW|OUTPUT|INPUT(_PULLUP)?|A\d+)\b/,
  'avr/interrupt.h': /\b(ISR|sei|cli)\b/,
  'avr/io.h': /\b(_BV|bit_is_(set|clear)|PORT[A-L]|PIN[A-L]|TCCR\w+|OCR\w+|TIMSK\w+)\b/,
  'avr/pgmspace.h': /\b(PROGMEM|pgm_read_\w+)\b/,
  'avr/wdt.h': /\b(wdt_\w+|WDTO_\w+)\b/,
  'stdint.h': /\bu?int(8|16|32|64)_t\b/,
  'util/atomic.h': /\bATOMIC_BLOCK\b/,
};

/** What user_hooks.h offers the user's own code, whether the firmware itself needs it or not. */
const FOR_HOOKS = /^(SAMPLE_PERIOD_US|classInForce|currentState|lastReason)$/;

/** Read by the compiler, the core, the interpreter, or the user. */
const CALLED_FROM_OUTSIDE = /^(setup|loop|keepResetFlags|user[A-Z]\w*|run|sample|stopped)$/;

const withoutCppComments = (text: string): string =>
  text
    .replaceAll(/\/\/.*$/gm, '')
    .replaceAll(/"(\\.|[^"\\\n])*"/g, (quoted) => quoted.replaceAll(/\w/g, '.'));

const withoutPythonComments = (text: string): string =>
  text
    .replaceAll(/"""[^]*?"""/g, '""')
    .replaceAll(/#.*$/gm, '')
    .replaceAll(/"(\\.|[^"\\\n])*"/g, '""');

function countOf(name: string, text: string): number {
  return text.match(new RegExp(`\\b${name}\\b`, 'g'))?.length ?? 0;
}

const all = (text: string, pattern: RegExp): string[] => [...text.matchAll(pattern)].map(([, name]) => name!);

/** Names with how often they stand there without a use: a function's declaration and definition are two. */
function cppDefinitions(text: string): Map<string, number> {
  const found = new Map<string, number>();
  const add = (name: string): void => {
    if (name !== 'PROGMEM') found.set(name, (found.get(name) ?? 0) + 1);
  };
  for (const name of all(
    text,
    /^ *(?:constexpr|const|volatile|static|int\d+_t|uint\d+_t|bool)\b[^=;(){}\n]*?\b(\w+)(?:\[\w*\])?(?: =|;| \{)/gm,
  ))
    add(name);
  for (const name of all(
    text,
    /^(?!.*\b(?:return|else|static_assert|using)\b)[A-Za-z_][\w:&*<> ]*[ &*(](\w+)\([^;{}]*?\)(?:\)\[\w+\])?(?: \{|;)/gm,
  ))
    add(name);
  for (const name of all(text, /^(?:enum class|struct|using) (\w+)/gm)) add(name);
  return found;
}

function cppIncludes(files: readonly SourceFile[]): string[] {
  return files.flatMap(({ path, text }) =>
    all(text, /^#include [<"](.*)[>"]/gm).flatMap((header) => {
      const code = withoutCppComments(text).replaceAll(/^#include.*$/gm, '');
      const own = files.find((file) => basename(file.path) === header);
      if (own === undefined)
        return SYSTEM_HEADERS[header]?.test(code) ? [] : [`${basename(path)}: <${header}>`];
      const names = [...cppDefinitions(withoutCppComments(own.text)).keys()];
      const isOwn = basename(path, '.cpp') === basename(header, '.h') || basename(path) === 'user_hooks.h';
      return isOwn || names.some((name) => countOf(name, code) > 0) ? [] : [`${basename(path)}: ${header}`];
    }),
  );
}

/** Unused names of an Arduino sketch. */
export function unusedInCpp(files: readonly SourceFile[]): string[] {
  const code = files.map(({ text }) => withoutCppComments(text)).join('\n');
  const unused = [...cppDefinitions(code)].filter(
    ([name, count]) =>
      !CALLED_FROM_OUTSIDE.test(name) && !FOR_HOOKS.test(name) && countOf(name, code) <= count,
  );
  return [...unused.map(([name]) => name), ...cppIncludes(files)];
}

/** Unused names of a MicroPython program. */
export function unusedInPython(files: readonly SourceFile[]): string[] {
  const texts = files.map(({ path, text }) => ({ path, code: withoutPythonComments(text) }));
  const imports = texts.flatMap(({ path, code }) => {
    const names = [
      ...all(code, /^(?: {4})?import (\w+)/gm),
      ...all(code, /^from \w+ import ([^(\n]+)$/gm).flatMap((list) => list.split(/,\s*/)),
      ...all(code, /^from \w+ import \(([^)]*)\)/gm).flatMap((list) => list.split(/[,\s]+/)),
    ].filter((name) => name !== '');
    // one that is imported for what importing does is said so by its comment, in main.py
    return names.filter((name) => countOf(name, code) < 2).map((name) => `${basename(path)}: import ${name}`);
  });
  const code = texts.map((file) => file.code).join('\n');
  const withoutImports = code.replaceAll(/^from \w+ import (\([^)]*\)|.*)$/gm, '');
  const defined = [
    ...all(code, /^(\w+) = /gm),
    ...all(code, /^ *def (\w+)\(/gm),
    ...all(code, /^class (\w+)/gm),
    ...all(code, /^ *self\.(\w+) = /gm),
  ].filter((name) => !CALLED_FROM_OUTSIDE.test(name) && name !== '__init__');
  const counts = new Map<string, number>();
  for (const name of defined) counts.set(name, (counts.get(name) ?? 0) + 1);
  const unused = [...counts].filter(([name, count]) => countOf(name, withoutImports) <= count);
  return [...unused.map(([name]) => name), ...imports];
}
