/**
 * The twin with a witness at each piece of arithmetic: its sources, with every sum, difference, product and shift wrapped in a call that
 * keeps the least and the largest value. The rest of the source stays as it is, so that what is watched is what is shipped.
 */
import { mkdtempSync, readFileSync, readdirSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import ts from 'typescript';
import type { SweepCalibration } from '../../../src/controller/calibration.js';
import type { Twin } from '../../../src/controller/twin.js';

/** One piece of arithmetic: `sensing.ts: sum + 1`, without `this.` and casts. */
export type Site = string;

export type Extremes = Map<Site, { least: number; most: number }>;

const CONTROLLER = fileURLToPath(new URL('../../../src/controller/', import.meta.url));
const WITNESS = '__witness';

const ARITHMETIC = new Set([
  ts.SyntaxKind.PlusToken,
  ts.SyntaxKind.MinusToken,
  ts.SyntaxKind.AsteriskToken,
  ts.SyntaxKind.LessThanLessThanToken,
  ts.SyntaxKind.GreaterThanGreaterThanToken,
  ts.SyntaxKind.SlashToken,
  ts.SyntaxKind.PlusEqualsToken,
  ts.SyntaxKind.MinusEqualsToken,
]);

function isArithmetic(node: ts.Node): node is ts.Expression {
  if (ts.isBinaryExpression(node)) return ARITHMETIC.has(node.operatorToken.kind);
  if (ts.isPostfixUnaryExpression(node)) return true;
  return (
    ts.isPrefixUnaryExpression(node) &&
    node.operator === ts.SyntaxKind.MinusToken &&
    !ts.isNumericLiteral(node.operand)
  );
}

function siteOf(file: string, node: ts.Node, source: ts.SourceFile): Site {
  const text = node
    .getText(source)
    .replaceAll(/this\.| as number|!/g, '')
    .replaceAll(/\s+/g, ' ');
  return `${file}: ${text}`;
}

function watching(file: string, sites: Set<Site>): ts.TransformerFactory<ts.SourceFile> {
  return (context) => (source) => {
    const visit = (node: ts.Node): ts.Node => {
      const inner = ts.visitEachChild(node, visit, context);
      if (!isArithmetic(node)) return inner;
      const site = siteOf(file, node, source);
      sites.add(site);
      const callee = context.factory.createIdentifier(WITNESS);
      return context.factory.createCallExpression(callee, undefined, [
        context.factory.createStringLiteral(site),
        inner as ts.Expression,
      ]);
    };
    return ts.visitEachChild(source, visit, context);
  };
}

export interface WatchedTwin {
  Twin: typeof Twin;
  SweepCalibration: typeof SweepCalibration;
  /** Every piece of arithmetic in the sources. */
  sites: ReadonlySet<Site>;
  /** What was seen since the last call of `forget`. */
  seen: Extremes;
}

/** The watched twin, as modules in a folder of their own. */
export async function watchedTwin(): Promise<WatchedTwin> {
  const folder = mkdtempSync(join(tmpdir(), 'fairlead-watched-'));
  writeFileSync(join(folder, 'package.json'), '{ "type": "module" }\n');
  const sites = new Set<Site>();
  const seen: Extremes = new Map();
  (globalThis as Record<string, unknown>)[WITNESS] = (site: Site, value: number): number => {
    const extremes = seen.get(site);
    if (extremes === undefined) seen.set(site, { least: value, most: value });
    else if (value < extremes.least) extremes.least = value;
    else if (value > extremes.most) extremes.most = value;
    return value;
  };
  for (const file of readdirSync(CONTROLLER)) {
    const { outputText } = ts.transpileModule(readFileSync(join(CONTROLLER, file), 'utf8'), {
      compilerOptions: { module: ts.ModuleKind.ESNext, target: ts.ScriptTarget.ES2022 },
      transformers: { before: [watching(file, sites)] },
    });
    writeFileSync(join(folder, file.replace(/\.ts$/, '.js')), outputText);
  }
  const load = async (file: string): Promise<Record<string, unknown>> =>
    (await import(/* @vite-ignore */ join(folder, file))) as Record<string, unknown>;
  return {
    ...(await load('twin.js')),
    ...(await load('calibration.js')),
    sites,
    seen,
  } as unknown as WatchedTwin;
}
