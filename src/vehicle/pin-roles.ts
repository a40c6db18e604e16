/** What a vehicle asks of a pin, and whether a pin can do it. */
import type { PinFacts } from './board-facts.js';

/** What a pin has to do. */
export type PinRole =
  'analog sensor' | 'digital sensor' | 'PWM output' | 'output' | 'button' | 'stop input' | 'encoder';

/** Whether a pin can do what a role asks. */
export function isAble(pin: PinFacts, role: PinRole): boolean {
  switch (role) {
    case 'analog sensor':
      return pin.adc !== undefined;
    case 'digital sensor':
      return pin.input;
    case 'encoder':
      return pin.input && pin.changeInterrupt === true;
    case 'PWM output':
      return pin.pwm !== undefined;
    case 'output':
      return pin.output;
    case 'button':
    case 'stop input':
      return pin.input && pin.pullUp;
  }
}

/** What is to be watched when a pin takes a role: nothing, or one sentence each. */
export function cautionsOf(pin: PinFacts, role: PinRole): string[] {
  const cautions = [pin.caution, role === 'analog sensor' ? pin.adc?.caution : undefined];
  return cautions.filter((caution) => caution !== undefined);
}

/** Name of the PWM output that a pin carries, where several pins can carry the same one; else undefined. */
export function sharedOutput(pin: PinFacts): string | undefined {
  if (pin.pwm === undefined || pin.pwm.channel === 'routed') return undefined;
  return `${pin.pwm.timer}${pin.pwm.channel}`;
}
