/** The command that drives one run of the report alone. */
import { shellWord } from '../shell-word.js';
import type { ReportData } from './report-data.js';

export function repeatCommand({ sheetFile, names, report }: ReportData, seed: number): string {
  const engine = report.engine === 'twin' ? '' : ` --on ${report.engine}`;
  const files = `${shellWord(sheetFile)} --course ${shellWord(names.course)}`;
  return `fairlead rehearse ${files}${engine} --laps ${names.laps} --runs 1 --seed ${seed}`;
}
