/** The wiring table: each pin that the vehicle uses, the supply, and what to be careful about. */
import type { PinFacts } from '../vehicle/board-facts.js';
import { type PinRole, cautionsOf } from '../vehicle/pin-roles.js';
import type { MotorWiring, Vehicle } from '../vehicle/vehicle.js';
import { pwmWords } from '../vehicle/pwm-modes.js';
import { VERSION } from '../version.js';
import { CAUTIONS } from './header.js';

interface PinRow {
  pin: string;
  to: string;
  note: string;
}

interface SupplyRow {
  from: string;
  to: string;
  note: string;
}

interface WiringView {
  name: string;
  origin: string;
  boardTitle: string;
  pins: readonly PinRow[];
  supply: readonly SupplyRow[];
  cautions: readonly string[];
}

function row(pin: PinFacts, role: PinRole, to: string, about: string): PinRow {
  const notes = [about, ...cautionsOf(pin, role).map((caution) => `Watch: ${caution}.`)];
  const names = pin.adc?.code === undefined || role !== 'analog sensor' || pin.adc.code === pin.label;
  return {
    pin: names ? pin.label : `${pin.label} (${pin.adc?.code})`,
    to,
    note: notes.filter((note) => note !== '').join(' '),
  };
}

function sensorRows({ bar, board }: Vehicle): PinRow[] {
  const { kinds, lineLevel } = bar;
  return bar.pins.map((pin, i) => {
    const mm = Math.round(bar.positionsM[i]! * 1e4) / 10;
    const place =
      mm === 0 ? 'in the middle' : `${Math.abs(mm)} mm ${mm > 0 ? 'left' : 'right'} of the middle`;
    const analog = kinds[i] === 'analog';
    const about = analog ? `0 to ${board.logicV} V` : `${lineLevel} over the line`;
    const what = bar.kind === 'mixed' ? `${kinds[i]} sensor` : 'sensor';
    const to = `output of ${what} ${i + 1} of ${bar.pins.length}, ${place}`;
    return row(pin, analog ? 'analog sensor' : 'digital sensor', to, `${about}.`);
  });
}

function motorRows(side: 'left' | 'right', vehicle: Vehicle): PinRow[] {
  const wiring: MotorWiring = vehicle.drive[side];
  const about = `PWM of ${pwmWords(vehicle)}.`;
  const rows: PinRow[] = [];
  const add = (pin: PinFacts | undefined, role: PinRole, input: string): void => {
    if (pin !== undefined)
      rows.push(row(pin, role, `driver, ${side} motor: ${input}`, role === 'PWM output' ? about : ''));
  };
  add(wiring.pwm, 'PWM output', 'PWM input');
  add(wiring.dir, 'output', 'direction input');
  const role = wiring.pwm === undefined ? 'PWM output' : 'output';
  add(wiring.in1, role, 'input 1');
  add(wiring.in2, role, 'input 2');
  return rows;
}

function otherRows({ drive, start, board, led, stopInput }: Vehicle): PinRow[] {
  const rows = [
    row(
      start.button,
      'button',
      'start button; its other contact to ground',
      'Internal pull-up, no resistor.',
    ),
  ];
  if (stopInput !== undefined) {
    const about =
      'Closed while the vehicle may move; open, or with a broken wire, it stops the motors. Internal pull-up, no resistor. No emergency stop.';
    rows.push(row(stopInput, 'stop input', 'stop input; the other contact to ground', about));
  }
  if (drive.standby !== undefined)
    rows.unshift(row(drive.standby, 'output', 'driver: standby input', 'High lets the driver work.'));
  if (led !== undefined) {
    const [from, to] = led.activeLow ? ['supply', 'pin'] : ['pin', 'ground'];
    const about = `In series with its resistor, from ${from} to ${to}; some milliamperes, see the data sheet of the board.`;
    rows.push(row(led.pin, 'output', 'LED that shows state and faults', about));
  }
  rows.push({ pin: 'GND', to: 'ground of sensors, driver and battery', note: 'One common point.' });
  rows.push({
    pin: `${board.logicV} V`,
    to: 'supply of the sensors, logic supply of the driver',
    note: 'Not the motors.',
  });
  return rows;
}

function supplyRows({ power, drive }: Vehicle): SupplyRow[] {
  const bothA = Math.round(2 * drive.stallCurrentA * 10) / 10;
  return [
    {
      from: 'battery +',
      to: 'fuse, then switch, then motor supply of the driver',
      note: `${power.emptyV} to ${power.fullV} V. Fuse at the battery's terminal; wire, switch and driver have to stand ${bothA} A, both motors held.`,
    },
    {
      from: 'behind the switch',
      to: "the board's supply input, or a regulator for it",
      note: `Only if the board takes ${power.fullV} V there; see its data sheet.`,
    },
    {
      from: 'battery -',
      to: 'ground of the driver, and from there ground of the board',
      note: "So the motors' current does not flow through the board.",
    },
    {
      from: 'motor supply of the driver',
      to: 'electrolytic capacitor to ground, close to the driver',
      note: 'Some hundred microfarads, rated above the full battery; it keeps dips off the board (common practice).',
    },
    {
      from: 'outputs of the driver, left and right',
      to: 'left and right motor',
      note: 'A wheel that turns backward: swap its two wires, or write inverted in the sheet.',
    },
    {
      from: 'each motor',
      to: 'ceramic capacitor across its terminals',
      note: '100 nF, against sparking (common practice).',
    },
  ];
}

function cautions({ board }: Vehicle): string[] {
  return [
    `The motors never run from a supply pin of the board (5 V or 3.3 V): their current breaks down the voltage or the regulator.`,
    `No input may see more than ${board.logicV} V${board.logicV < 5 ? ': sensors on 5 V need a divider or a level shifter' : ''}.`,
    ...(board.wiring ?? []),
    'Do not connect USB and a battery at the same time unless the data sheet of the board allows it.',
    ...CAUTIONS,
  ];
}

export function wiringView(vehicle: Vehicle): WiringView {
  const { board } = vehicle;
  return {
    name: vehicle.name,
    origin: `Written by fairlead ${VERSION}; change the build sheet, not this file.`,
    boardTitle: board.title,
    pins: [
      ...sensorRows(vehicle),
      ...motorRows('left', vehicle),
      ...motorRows('right', vehicle),
      ...otherRows(vehicle),
    ],
    supply: supplyRows(vehicle),
    cautions: cautions(vehicle),
  };
}
