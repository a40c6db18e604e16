/**
 * What an engine is made from, as plain data: it can be sent to a worker thread, which makes an engine of its own from it.
 *
 * Making the parts renders and compiles; making the engine does not.
 */
import type { ControllerConstants } from '../controller/constants.js';
import type { Design } from '../design/design.js';
import type { SheetIdentity } from '../firmware/render.js';
import type { Vehicle } from '../vehicle/vehicle.js';
import type { ChipImage } from './chip-build.js';
import type { Engine, EngineName } from './engine.js';
import type { PythonFile } from './micropython-interpreter.js';

export type EngineParts = { vehicle: Vehicle } & (
  | { name: 'twin'; controller: ControllerConstants }
  | { name: 'chip'; image: ChipImage }
  | { name: 'micropython'; files: readonly PythonFile[] }
);

/** Renders and compiles what the engine needs; engines.ts has said whether it fits the board. */
export async function enginePartsFor(
  name: EngineName,
  sheet: SheetIdentity,
  design: Design,
): Promise<EngineParts> {
  const { vehicle, controller } = design;
  switch (name) {
    case 'twin':
      return { name, vehicle, controller };
    case 'chip':
      return {
        name,
        vehicle,
        image: (await (await import('./chip-engine.js')).chipEngine(sheet, design)).image,
      };
    case 'micropython': {
      const { micropythonEngine } = await import('./micropython-engine.js');
      return { name, vehicle, files: (await micropythonEngine(sheet, design)).files };
    }
  }
}

/** The engine. Each kind is loaded only when it is asked for: the chip and the interpreter are heavy. */
export async function engineFrom(parts: EngineParts): Promise<Engine> {
  switch (parts.name) {
    case 'twin':
      return (await import('./twin-maker.js')).twinEngine(parts.vehicle, parts.controller);
    case 'chip':
      return new (await import('./chip-engine.js')).ChipEngine(parts.image, parts.vehicle);
    case 'micropython':
      return new (await import('./micropython-engine.js')).MicroPythonEngine(parts.files, parts.vehicle);
  }
}
