/** The papers beside the firmware: wiring table, how to load it, and for Arduino the project file of arduino-cli. */
import type { FirmwareDesign, RenderedFile, Rendering, SheetIdentity } from './render.js';
import { fillTemplates, renderFirmware } from './render.js';
import { fileName } from './identifiers.js';
import { loadingView } from './papers-loading.js';
import { wiringView } from './papers-wiring.js';

function paper(name: string, vehicleName: string, wanted = true): Rendering['files'][number] {
  return { template: name, path: `${fileName(vehicleName)}/${name}`, owner: 'tool', wanted };
}

/** Wiring, loading, and the project file where the language has one. */
export async function renderPapers(
  design: FirmwareDesign,
  firmware: readonly RenderedFile[],
): Promise<RenderedFile[]> {
  const { name, board } = design.vehicle;
  return fillTemplates({
    folder: 'papers',
    language: 'python',
    files: [
      paper('WIRING.md', name),
      paper('FLASHING.md', name),
      paper('sketch.yaml', name, board.core !== undefined),
    ],
    view: { ...wiringView(design.vehicle), ...loadingView(design.vehicle, firmware) },
  });
}

/** All that a render writes, the manifest excepted: the firmware and the papers beside it. */
export async function renderProject(sheet: SheetIdentity, design: FirmwareDesign): Promise<RenderedFile[]> {
  const firmware = await renderFirmware(sheet, design);
  return [...firmware, ...(await renderPapers(design, firmware))];
}
