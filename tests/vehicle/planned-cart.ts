/** The demo cart on another board, wired by the pin plan. */
import type { BoardId } from '../../src/vehicle/board-facts.js';
import { usualKinds } from '../../src/sheet/sensor-kinds.js';
import { BOARDS } from '../../src/vehicle/boards.js';
import { type PinRequest, proposePins } from '../../src/vehicle/pin-plan.js';
import type { Changes } from '../sheet/example-sheet.js';

/** @throws Error where the board has too few pins */
export function plannedCart(board: BoardId, request: PinRequest): Changes {
  const { language, adcMaxCount } = BOARDS[board];
  const plan = proposePins(board, request);
  if (!('sensorPins' in plan)) throw new Error(plan.message);
  const kinds = request.sensorKind === 'mixed' ? usualKinds(request.sensorCount) : undefined;
  const analogCount = kinds?.filter((kind) => kind === 'analog').length ?? request.sensorCount;
  const readings = (share: number) => new Array<number>(analogCount).fill(Math.round(share * adcMaxCount));
  return {
    '/target': { board, language },
    '/sensors/kind': request.sensorKind,
    '/sensors/kinds': kinds,
    '/sensors/count': request.sensorCount,
    '/sensors/pins': plan.sensorPins,
    '/sensors/calibration':
      request.sensorKind !== 'digital'
        ? { mode: 'stored', ground: readings(0.12), line: readings(0.82) }
        : undefined,
    '/drive/driver': { scheme: request.scheme, ...plan.driver },
    '/start/buttonPin': plan.buttonPin,
    '/stopPin': plan.stopPin,
  };
}
