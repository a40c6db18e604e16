import { coveredShare } from '../../vehicle/sensor-bar.js';
import type { Problem } from '../problem.js';
import { analogPlaces } from '../sensor-kinds.js';
import { withUnit } from '../words.js';
import type { SheetRule } from './rule.js';

export const rule: SheetRule = {
  name: 'sweep-sees-ground',
  level: 'problem',
  why: 'A sweep tells line from ground by what the outermost analog sensors read first, with the vehicle standing on the line: they must see ground then.',
  check({ sheet, positionsMm }): Problem[] {
    const { kind, kinds, count, calibration, spotRadiusMm } = sheet.sensors;
    if (kind !== 'mixed' || kinds?.length !== count || calibration.mode !== 'sweep') return [];
    const places = analogPlaces(sheet.sensors);
    const outer = [places[0], places.at(-1)];
    const seeing = outer.find((place) => {
      const position = place === undefined ? undefined : positionsMm?.[place];
      return position !== undefined && coveredShare(position, sheet.line.widthMm, spotRadiusMm) > 0;
    });
    if (seeing === undefined) return [];
    const clearMm = sheet.line.widthMm / 2 + spotRadiusMm;
    const gotMm = Math.abs(positionsMm?.[seeing] ?? 0);
    return [
      {
        pointer: '/sensors/calibration/mode',
        message: `Sensor ${seeing + 1}, the outermost analog one, sees the line on which the vehicle stands when a sweep begins; the sweep then cannot tell whether the line reads higher or lower.`,
        got: `${withUnit(Math.round(gotMm * 10) / 10, 'mm')} from the middle`,
        allowed: `at least ${withUnit(Math.round(clearMm * 10) / 10, 'mm')}`,
        fix: 'Write "mode": "stored" with readings of the analog sensors, or put analog sensors further out.',
      },
    ];
  },
};
