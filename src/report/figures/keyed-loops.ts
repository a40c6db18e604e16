/** The loops of a Bode plot with their lines, and the margins that are drawn in and written beside them. */
import type { DesignedClass, Margins } from '../../design/design.js';
import { type ClassLoops, type DrawnLoop, cornerWords, marginWords } from './drawn-loops.js';
import { DASHED, DOTTED, type LineStyle, SOLID } from './line-style.js';

export interface KeyedLoop {
  loop: DrawnLoop;
  style: LineStyle;
  /** For the key: what this loop is, with its margins. */
  words: string;
  /** Present where the margin is drawn in on this loop. */
  gainLabel?: string;
  phaseLabel?: string;
}

interface Shown {
  gain: boolean;
  phase: boolean;
}

/**
 * An unstable loop has crossings, but no margins to draw or to name.
 *
 * @param name what sets a corner apart; none for the nominal vehicle
 */
function keyedLoop(loop: DrawnLoop, style: LineStyle, margins: Margins, shown: Shown, name?: string) {
  const isStable = Number.isFinite(margins.ms);
  const gain = marginWords.gain(margins.gainMargin);
  const phase = marginWords.phase(margins.phaseMarginDeg);
  const found = [
    ...(shown.gain ? [`gain margin ${gain}`] : []),
    ...(shown.phase ? [`phase margin ${phase}`] : []),
  ];
  const words = `${name ?? 'nominal'}: ${isStable ? found.join(', ') : 'unstable'}`;
  const role = name === undefined ? 'nominal' : 'worst';
  const keyed: KeyedLoop = { loop, style, words };
  if (isStable && shown.gain) keyed.gainLabel = `GM ${gain} ${role}`;
  if (isStable && shown.phase) keyed.phaseLabel = `PM ${phase} ${role}`;
  return keyed;
}

/** The nominal loop, then the worst corners: one where it has both margins, none where the nominal vehicle has the worst. */
export function keyedLoops({ margins, worstMargins }: DesignedClass, loops: ClassLoops): KeyedLoop[] {
  const { nominal, worstGain, worstPhase } = loops;
  const keyed = [keyedLoop(nominal, SOLID, margins, { gain: true, phase: true })];
  const add = (loop: DrawnLoop, style: LineStyle, shown: Shown) => {
    if (loop === nominal) return;
    keyed.push(keyedLoop(loop, style, worstMargins, shown, cornerWords(loop.corner)));
  };
  if (worstGain === worstPhase) {
    add(worstGain, DASHED, { gain: true, phase: true });
  } else {
    add(worstGain, DASHED, { gain: true, phase: false });
    add(worstPhase, DOTTED, { gain: false, phase: true });
  }
  return keyed;
}
