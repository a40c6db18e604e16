/**
 * From a design to the text of every firmware file: view model -> templates -> formatter.
 *
 * Templates hold no arithmetic and branch only on booleans of the view model; a name that the view model lacks is an
 * error (strict, and the checks below), so is a helper that is not one of ours (knownHelpersOnly). Numbers and user text pass through one
 * helper each. The same sheet and version give the same bytes: no date, host name or path enters a view model.
 */
import { readFile } from 'node:fs/promises';
import Handlebars from 'handlebars';
import type { Design, DesignedClass } from '../design/design.js';
import { comment } from './comments.js';
import { formatCode } from './format.js';
import { markdown } from './markdown.js';
import { type IntegerType, type Language, literal } from './literals.js';

/** Whose file it is once it is written: the tool's, or the user's own, which is never overwritten. */
export type Owner = 'tool' | 'user';

export interface RenderedFile {
  /** Relative to the output folder, with forward slashes: "tray-cart/constants.h". */
  path: string;
  text: string;
  owner: Owner;
}

/** One file that a language may write; the template is `templates/<folder>/<template>.hbs`. */
export interface TemplateFile {
  template: string;
  path: string;
  owner: Owner;
  /** Whether this vehicle needs the file. */
  wanted: boolean;
}

/** What one language makes of a design. */
export interface Rendering {
  /** Folder below templates/. */
  folder: 'arduino' | 'micropython' | 'papers';
  language: Language;
  files: readonly TemplateFile[];
  view: object;
}

/** The sheet's identity, as the files' headers carry it. */
export interface SheetIdentity {
  /** SHA-256 of the sheet's bytes, hexadecimal. */
  digest: string;
}

/** What the firmware is made from: of a design, all but how it was found. */
export interface FirmwareDesign extends Pick<Design, 'vehicle' | 'controller'> {
  classes: readonly Pick<DesignedClass, 'minRadiusM' | 'speedMps' | 'limitedBy'>[];
}

const TEMPLATES = new URL('../../templates/', import.meta.url);

/** Strict mode does not reach the arguments of blocks: a name misspelt in a condition would silently be false. */
function checkBlocks(engine: typeof Handlebars): void {
  const check = (name: string, isSound: (value: unknown) => boolean, kind: string): void => {
    const block = engine.helpers[name]!;
    engine.registerHelper(name, function (this: unknown, value: unknown, options: Handlebars.HelperOptions) {
      if (!isSound(value))
        throw new TypeError(`{{#${name}}} takes a ${kind} of the view model, not ${typeof value}.`);
      return block.call(this, value, options) as string;
    });
  };
  const isBoolean = (value: unknown) => typeof value === 'boolean';
  check('if', isBoolean, 'boolean');
  check('unless', isBoolean, 'boolean');
  check('each', Array.isArray, 'list');
}

function engineFor(language: Language): typeof Handlebars {
  const engine = Handlebars.create();
  checkBlocks(engine);
  engine.registerHelper('literal', (value: number, type: IntegerType) => literal(value, type, language));
  engine.registerHelper('comment', (text: unknown) => {
    if (typeof text !== 'string')
      throw new TypeError(`{{comment}} takes a text of the view model, not ${typeof text}.`);
    return comment(text, language);
  });
  engine.registerHelper('markdown', (text: unknown) => {
    if (typeof text !== 'string')
      throw new TypeError(`{{markdown}} takes a text of the view model, not ${typeof text}.`);
    return markdown(text);
  });
  return engine;
}

const COMPILE_OPTIONS: CompileOptions = {
  noEscape: true,
  strict: true,
  knownHelpersOnly: true,
  knownHelpers: { literal: true, comment: true, markdown: true },
};

type Template = (view: object) => string;

/** Templates compiled so far, by path: compiling takes as long as formatting. */
const compiled = new Map<string, Template>();

async function templateAt(path: string, language: Language): Promise<Template> {
  let template = compiled.get(path);
  if (template === undefined) {
    const source = await readFile(new URL(path, TEMPLATES), 'utf8');
    template = engineFor(language).compile(source, COMPILE_OPTIONS);
    compiled.set(path, template);
  }
  return template;
}

/** Fills in one rendering's templates; files that the vehicle does not need are left out. */
export async function fillTemplates(rendering: Rendering): Promise<RenderedFile[]> {
  const files: RenderedFile[] = [];
  for (const { template, path, owner, wanted } of rendering.files) {
    if (!wanted) continue;
    const fill = await templateAt(`${rendering.folder}/${template}.hbs`, rendering.language);
    const filled = fill(rendering.view);
    files.push({ path, owner, text: await formatCode(filled, path, rendering.language) });
  }
  return files;
}

async function renderingOf(sheet: SheetIdentity, design: FirmwareDesign): Promise<Rendering> {
  if (design.vehicle.language === 'arduino') {
    const { arduinoRendering } = await import('./view-arduino.js');
    return arduinoRendering(sheet, design);
  }
  const { micropythonRendering } = await import('./view-micropython.js');
  return micropythonRendering(sheet, design);
}

/** The firmware of one vehicle, the manifest excepted. */
export async function renderFirmware(sheet: SheetIdentity, design: FirmwareDesign): Promise<RenderedFile[]> {
  return fillTemplates(await renderingOf(sheet, design));
}
