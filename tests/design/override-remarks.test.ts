import { describe, expect, test } from 'vitest';
import { unprovenDesign } from '../../src/design/derive.js';
import { stateTable } from '../../src/design/state-table.js';
import type { Vehicle } from '../../src/vehicle/vehicle.js';
import { demoVehicle } from './demo-vehicle.js';

type Overrides = NonNullable<Vehicle['control']['overrides']>;

function designWith(overrides: Overrides) {
  const vehicle = demoVehicle('rules');
  return unprovenDesign({ ...vehicle, control: { ...vehicle.control, overrides } });
}

describe('rules by hand', () => {
  test('a mirrored pair takes the place of the computed actions, without a remark', () => {
    const design = designWith([
      { first: 0, last: 0, left: 0, right: 1.875 },
      { first: 5, last: 5, left: 1.875, right: 0 },
    ]);
    const table = stateTable(design.vehicle, design.controller);
    expect(table[0b100000]).toMatchObject({ left: 0, right: 1.875 });
    expect(table[0b000001]).toMatchObject({ left: 1.875, right: 0 });
    expect(table[0b010000]!.left).not.toBe(0);
    expect(design.remarks).toEqual([]);
  });

  test('one side alone is told as asymmetric', () => {
    const { remarks } = designWith([{ first: 0, last: 0, left: 0, right: 1.875 }]);
    expect(remarks).toEqual([
      'States 100000 and 000001 are mirror images, their actions are not: the vehicle will favour one side.',
    ]);
  });

  test('an action against the order of the others is told', () => {
    const { remarks } = designWith([
      { first: 1, last: 1, left: 1, right: 1 },
      { first: 4, last: 4, left: 1, right: 1 },
    ]);
    expect(remarks.join('\n')).toMatch(
      /In state 010000 the vehicle turns less to the left than in 011000, though the line is further left/,
    );
  });
});
