/** `fairlead derive SHEET`: the numbers of the design, with their units and where each comes from. */
import type { Command } from 'commander';
import type { Io } from './io.js';

interface DeriveOptions {
  json?: boolean;
  compare?: boolean;
}

export function register(program: Command, io: Io): void {
  program
    .command('derive')
    .description('the numbers of the design: gains, margins, rule table, speed classes and what limits each')
    .argument('<sheet>', 'build sheet')
    .option('--compare', 'judge published tuning rules on the same loops')
    .option('--json', 'print one JSON document')
    .addHelpText('after', '\nExample:\n  fairlead derive examples/tray-cart/tray-cart.json\n')
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
      if (options.json) io.json({ ...designJson(design), ...(compared && { comparison: compared }) });
      else io.stdout(designText(design) + (compared ? comparisonText(compared) : ''));
    });
}
