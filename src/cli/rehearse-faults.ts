/** The option `--fault` of `fairlead rehearse`: its reading and its help. */
import { InvalidArgumentError } from 'commander';
import { FAULT_FORMS, type Fault, parseFault } from '../rehearsal/fault.js';
import { table } from '../report/text-table.js';

/** Reads one more fault. */
export function faultOption(text: string, before: Fault[] | undefined): Fault[] {
  try {
    return [...(before ?? []), parseFault(text)];
  } catch (error) {
    throw new InvalidArgumentError((error as Error).message);
  }
}

export function faultsHelp(): string {
  const rows = FAULT_FORMS.map(({ form, about }) => [form, about]);
  return `Faults, each with the time after setting off, and how long it lasts where it does not stay:
  fairlead rehearse cart.json --course lane.json --fault sensor=2:stuck-high@3.0s
  fairlead rehearse cart.json --course lane.json --on chip --fault line=gone@2s+0.3s --fault battery=4.8V@1s

${table(rows)}
With faults a run goes on after a loss until the firmware has switched the motors off. Told are the reason, as the LED shows it
(of the twin: only a lost line and a blocked wheel; it is the controller without the board around it), and the time from the first fault
to the last moment at which a motor was driven.
`;
}
