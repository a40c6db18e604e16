/** `fairlead render SHEET --out DIR`: the firmware of a sheet, and what writing it changes. */
import { join } from 'node:path';
import type { Command } from 'commander';
import type { PlannedFile, RenderPlan } from '../firmware/plan.js';
import { EXIT, FairleadError } from '../sheet/problem.js';
import type { Io } from './io.js';

const EXAMPLES = `
Examples:
  fairlead render cart.json --out firmware
  fairlead render cart.json --out firmware --dry-run    what would change; writes nothing
  fairlead render cart.json --out firmware --verify     whether the files are those of the sheet

The files go to DIR/<name of the vehicle>/. user_hooks files are yours: written once, never overwritten. A file of fairlead's
that was edited by hand is not overwritten either; the command then names it and writes nothing.

Exit codes: 0 done, 2 the sheet has problems or the folder cannot be written, 3 no design meets the sheet,
4 files were edited by hand, or (--verify) differ from the sheet.
`;

interface RenderOptions {
  out: string;
  verify?: boolean;
  dryRun?: boolean;
  json?: boolean;
}

export function register(program: Command, io: Io): void {
  program
    .command('render')
    .description('write the firmware of a build sheet')
    .argument('<sheet>', 'build sheet')
    .requiredOption('--out <dir>', 'folder for the firmware; it is made if need be')
    .option('--verify', 'write nothing; fail where the files differ from the sheet')
    .option('--dry-run', 'write nothing; show what would change')
    .option('--json', 'print one JSON document: { ok, written, folder, sheetSha256, files }')
    .addHelpText('after', EXAMPLES)
    .action((path: string, options: RenderOptions) => render(path, options, io));
}

async function render(path: string, options: RenderOptions, io: Io): Promise<void> {
  const { loadDesign } = await import('./load-design.js');
  const { renderProject } = await import('../firmware/papers.js');
  const { planRender, isUpToDate } = await import('../firmware/plan.js');
  const { refuseEdits, writePlan } = await import('../firmware/write.js');

  io.progress('designing ...');
  const { digest, design } = await loadDesign(path);
  const files = await renderProject({ digest }, design);
  io.progress('');
  const plan = await planRender(files, { digest }, options.out);

  const writes = options.verify !== true && options.dryRun !== true;
  if (writes) await writePlan(plan);
  if (options.json !== true) io.stdout(planText(plan, io));
  if (options.verify === true && !isUpToDate(plan)) throw differing(plan, path);
  if (options.dryRun === true) refuseEdits(plan);
  if (options.json === true) io.json(planJson(plan, writes, digest));
  else io.stdout(closingLine(plan, options, writes));
}

const WORDS: Readonly<Record<PlannedFile['status'], string>> = {
  new: 'new',
  same: 'unchanged',
  changed: 'changed',
  edited: 'edited by hand',
  obsolete: 'no longer needed',
  kept: 'yours, kept',
};

/** One line a file; unchanged ones are only counted. */
function planText(plan: RenderPlan, io: Io): string {
  const shown = plan.files.filter(({ status }) => status !== 'same');
  const width = Math.max(0, ...shown.map(({ path }) => path.length));
  const lines = shown.map(({ path, status, changes }) => {
    const counts = [
      changes.added > 0 ? io.style('green', `+${changes.added}`) : '',
      changes.removed > 0 ? io.style('red', `-${changes.removed}`) : '',
    ].filter(Boolean);
    const amount = counts.length > 0 ? ` (${counts.join(' ')} lines)` : '';
    return `  ${path.padEnd(width)}  ${WORDS[status]}${amount}\n`;
  });
  const same = plan.files.length - shown.length;
  return lines.join('') + (same > 0 ? `  ${same} file${same === 1 ? '' : 's'} unchanged\n` : '');
}

function closingLine(plan: RenderPlan, options: RenderOptions, writes: boolean): string {
  const folder = join(plan.out, plan.folder);
  if (options.verify === true) return `${folder} is what the sheet gives.\n`;
  if (!writes) return `Nothing was written. Without --dry-run the files go to ${folder}.\n`;
  return `The firmware is in ${folder}. First run: wheels off the floor.\n`;
}

function planJson(plan: RenderPlan, written: boolean, digest: string): object {
  const sums = new Map(plan.manifest.files.map((entry) => [`${plan.folder}/${entry.path}`, entry.sha256]));
  return {
    ok: true,
    written,
    folder: join(plan.out, plan.folder),
    sheetSha256: digest,
    files: plan.files.map(({ path, status, changes }) => ({
      path,
      status,
      added: changes.added,
      removed: changes.removed,
      ...(sums.has(path) ? { sha256: sums.get(path) } : {}),
    })),
  };
}

function differing(plan: RenderPlan, path: string): FairleadError {
  const problems = plan.files
    .filter(({ status }) => status !== 'same' && status !== 'kept')
    .map(({ path: file, status }) => ({
      pointer: '',
      message: `${join(plan.out, file)} is not what ${path} gives.`,
      got: status === 'new' ? 'no such file' : WORDS[status],
      fix: status === 'edited' ? 'Put the change into the sheet or into user_hooks.' : 'Render again.',
    }));
  return new FairleadError('The files differ from the sheet.', { exitCode: EXIT.filesDiffer, problems });
}
