/** `fairlead derive SHEET`: the numbers of the design, with their units and where each comes from. */
import type { Command } from 'commander';
import type { Design } from '../design/design.js';
import type { WhatIf } from '../design/what-if.js';
import type { Io } from './io.js';
import { visible } from '../sheet/words.js';

interface DeriveOptions {
  json?: boolean;
  compare?: boolean;
  figures?: string;
  whatIf?: boolean;
}

const EXAMPLES = `
Examples:
  fairlead derive examples/tray-cart/tray-cart.json
  fairlead derive cart.json --figures pictures     the same numbers, and pictures/bode.svg and others
  fairlead derive cart.json --what-if              which change of bar, motors or tyres would help most
`;

export function register(program: Command, io: Io): void {
  program
    .command('derive')
    .description('the numbers of the design: gains, margins, rule table, speed classes and what limits each')
    .argument('<sheet>', 'build sheet')
    .option('--compare', 'judge published tuning rules on the same loops')
    .option(
      '--figures <dir>',
      'draw Bode and Nyquist plots, bend entry, speeds and rule table as SVG files in a folder',
    )
    .option('--what-if', 'design again with each of several changes of hardware, and say which helps most')
    .option('--json', 'print one JSON document')
    .addHelpText('after', EXAMPLES)
    .action(async (file: string, options: DeriveOptions) => {
      const [{ loadDesign }, { designJson }, { designText }, { compareLaws, comparisonText }] =
        await Promise.all([
          import('./load-design.js'),
          import('../report/design-json.js'),
          import('../report/design-text.js'),
          import('../report/comparison-text.js'),
        ]);
      const { design } = await loadDesign(file);
      const compared = options.compare ? compareLaws(design) : undefined;
      const figures = options.figures === undefined ? undefined : await drawFigures(design, options.figures);
      const changes = options.whatIf ? await changesOf(design, io) : undefined;
      if (options.json) {
        io.json({
          ...designJson(design),
          ...(compared && { comparison: compared }),
          ...(figures && { figures }),
          ...(changes && { whatIf: changes }),
        });
        return;
      }
      const comparison = compared ? comparisonText(compared) : '';
      io.stdout(designText(design) + comparison + figureLines(figures ?? []));
      if (changes) io.stdout((await import('../report/what-if-text.js')).whatIfText(changes));
    });
}

async function changesOf(design: Design, io: Io): Promise<WhatIf[]> {
  const { whatIf } = await import('../design/what-if.js');
  io.progress('designing again with each change ...');
  const changes = whatIf(design);
  io.progress('');
  return changes;
}

/** @returns paths of the files written */
async function drawFigures(design: Design, folder: string): Promise<string[]> {
  const [{ designFigures }, { writeFigures }] = await Promise.all([
    import('../report/figures/design-figures.js'),
    import('../report/figures/write-figures.js'),
  ]);
  return writeFigures(folder, designFigures(design));
}

function figureLines(paths: readonly string[]): string {
  return paths.length === 0 ? '' : `\nFigures:\n${paths.map((path) => `  ${visible(path)}\n`).join('')}`;
}
