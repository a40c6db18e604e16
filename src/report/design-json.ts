/** The design as `derive --json` gives it. */
import type { Design, Margins } from '../design/design.js';
import { biasOffsetM, hasIntegral } from '../design/bias.js';
import { stopBoundS } from '../design/delay.js';
import { lineLossBoundS } from '../design/line-loss.js';
import { cornerText } from '../design/law-binding.js';
import { quantisedConstants } from '../design/quantisation.js';
import { predictCycles } from '../design/rule-cycle.js';
import { stateTable } from '../design/state-table.js';
import { fractionToPercent, mToMm } from '../sheet/units.js';

/** JSON has no infinity: a margin that nothing bounds is null. */
function marginsJson({ gainMargin, phaseMarginDeg, ms }: Margins) {
  const finite = (value: number) => (Number.isFinite(value) ? value : null);
  return { gainMargin: finite(gainMargin), phaseMarginDeg: finite(phaseMarginDeg), ms: finite(ms) };
}

export function designJson(design: Design) {
  const { vehicle, classes, controller } = design;
  return {
    ok: true,
    name: vehicle.name,
    control: controller.kind,
    delay: design.delay,
    ...(design.wheelLoop && { wheelLoop: design.wheelLoop }),
    classes: classes.map((each) => ({
      name: each.name,
      minRadiusMm: mToMm(each.minRadiusM),
      speedMps: each.speedMps,
      limitedBy: each.limitedBy,
      limitsMps: each.limits,
      gains: each.gains,
      plant: each.plant,
      controller: each.controller,
      margins: marginsJson(each.margins),
      worstMargins: marginsJson(each.worstMargins),
      binding: { ...each.binding, corner: { ...each.binding.corner, text: cornerText(each.binding.corner) } },
    })),
    rules: controller.rules
      ? stateTable(vehicle, controller).map(({ state, kind, left, right, fromM, toM }) => ({
          state,
          kind,
          left,
          right,
          ...(fromM === undefined || toM === undefined ? {} : { fromMm: mToMm(fromM), toMm: mToMm(toM) }),
        }))
      : [],
    ...(controller.rules && { cycles: predictCycles(vehicle, classes) }),
    proof: {
      runs: design.proof.runs,
      finished: design.proof.finished,
      targetPercent: fractionToPercent(design.proof.targetShare),
      confidencePercent: fractionToPercent(design.proof.confidenceShare),
    },
    lineLossBoundS: lineLossBoundS(controller),
    ...(vehicle.stopInput && { stopBoundS: stopBoundS(vehicle) }),
    biasOffsetMm: mToMm(biasOffsetM(design)),
    integral: hasIntegral(design),
    quantisation: quantisedConstants(design),
    firmware: controller,
    remarks: design.remarks,
  };
}
