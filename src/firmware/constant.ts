/** A named integer of the firmware, with the comment that explains it. */
import { identifier } from './identifiers.js';
import type { IntegerType } from './literals.js';

/** One integer constant, or a table of them, as it is declared and commented. */
export interface Constant {
  /** SCREAMING_SNAKE with its unit at the end; _Qn: the quantity times 2^n. */
  name: string;
  type: IntegerType;
  /** One value; absent for a table. */
  value?: number;
  /** Values of a table; absent for a single constant. */
  values?: readonly number[];
  table: boolean;
  /** Meaning, value in human units, and the answer that it came from. */
  about: string;
}

export interface ConstantGroup {
  title: string;
  constants: readonly Constant[];
}

/** One list of constants serves both languages, so a name has to be one in both. */
function checked(name: string): string {
  return identifier(identifier(name, 'cpp'), 'python');
}

/** A single constant. */
export function constant(name: string, type: IntegerType, value: number, about: string): Constant {
  return { name: checked(name), type, value, table: false, about };
}

/** A table of constants. */
export function table(name: string, type: IntegerType, values: readonly number[], about: string): Constant {
  return { name: checked(name), type, values, table: true, about };
}
