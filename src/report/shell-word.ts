/** The one place that writes a word into a command for a person to type: a word as a POSIX shell takes it, whatever it holds. */
export function shellWord(word: string): string {
  return /^[\w./-]+$/.test(word) && !word.startsWith('-') ? word : `'${word.replaceAll("'", "'\\''")}'`;
}
