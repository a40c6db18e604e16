/**
 * Formatting of emitted code, by the formatters that people use themselves: clang-format and ruff, as WebAssembly.
 *
 * Both are loaded only when a file of their language is written; they take about 20 ms and 5 ms to start.
 */
import type { Language } from './literals.js';

export const LINE_WIDTH = 100;

const CLANG_FORMAT_STYLE = JSON.stringify({
  BasedOnStyle: 'Google',
  ColumnLimit: LINE_WIDTH,
  DerivePointerAlignment: false,
  AllowShortFunctionsOnASingleLine: 'Empty',
  AllowShortLoopsOnASingleLine: true,
  IncludeBlocks: 'Preserve',
  SortIncludes: 'Never',
  ReflowComments: false,
  SpacesBeforeTrailingComments: 2,
});

async function formatCpp(text: string, path: string): Promise<string> {
  const { format } = await import('@wasm-fmt/clang-format');
  // The Arduino extension is unknown to clang-format; the language is the same.
  return format(text, path.replace(/\.ino$/, '.cpp'), CLANG_FORMAT_STYLE);
}

async function formatPython(text: string, path: string): Promise<string> {
  const { format } = await import('@wasm-fmt/ruff_fmt');
  return format(text, path, { line_width: LINE_WIDTH, indent_width: 4, line_ending: 'lf' });
}

/** The text as the language's formatter lays it out, if it is code; one line end at the end. */
export async function formatCode(text: string, path: string, language: Language): Promise<string> {
  if (/\.(md|yaml)$/.test(path)) return `${text.trimEnd()}\n`;
  const formatted = language === 'cpp' ? await formatCpp(text, path) : await formatPython(text, path);
  return `${formatted.trimEnd()}\n`;
}
