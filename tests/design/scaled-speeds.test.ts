import { expect, it } from 'vitest';
import { drivenSpeedMps } from '../../src/design/driven-speed.js';
import { scaledSpeeds } from '../../src/design/scaled-speeds.js';
import { cart, quickDesign } from '../firmware/cart.js';

const { vehicle, controller } = quickDesign(cart());

it('scales what is driven at every radius, up to full wheel speed', () => {
  for (const factor of [0.7, 1, 1.2]) {
    const scaled = scaledSpeeds(controller, vehicle, factor);
    for (const radiusM of [0.1, 0.13, 0.2, 0.4, 1, 5]) {
      const wanted = Math.min(vehicle.drive.topSpeedMps, factor * drivenSpeedMps(controller, radiusM));
      expect(drivenSpeedMps(scaled, radiusM) / wanted).toBeCloseTo(1, 2);
    }
    expect({ ...scaled, classes: [] }).toEqual({ ...controller, classes: [] });
  }
  const most = scaledSpeeds(controller, vehicle, 5);
  expect(drivenSpeedMps(most, 0.5)).toBeCloseTo(vehicle.drive.topSpeedMps, 3);
});
