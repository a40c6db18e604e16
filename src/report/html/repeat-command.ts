/** The command that drives one run of the report alone. */
import type { ReportData } from './report-data.js';

/** A word as a POSIX shell takes it. */
function shellWord(word: string): string {
  return /^[\w./-]+$/.test(word) && !word.startsWith('-') ? word : `'${word.replaceAll("'", "'\\''")}'`;
}

export function repeatCommand({ sheetFile, names, report }: ReportData, seed: number): string {
  const engine = report.engine === 'twin' ? '' : ` --on ${report.engine}`;
  const files = `${shellWord(sheetFile)} --course ${shellWord(names.course)}`;
  return `fairlead rehearse ${files}${engine} --laps ${names.laps} --runs 1 --seed ${seed}`;
}
