/** The wheel loop in the firmware's integers. */
import {
  COEFFICIENT_BITS,
  FULL_SPEED,
  SPEED_BITS,
  WHEEL_GAIN_BITS,
  type WheelLoopConstants,
} from '../controller/constants.js';
import type { Vehicle } from '../vehicle/vehicle.js';
import { INT16_MAX } from './scales.js';

/** Largest correction, as a share of full speed: an empty battery and a weak motor together. */
const CORRECTION_SHARE = 0.5;
/** Speed above which a wheel has to turn, and the time that it may stand still, s. */
const BLOCKED_SPEED_SHARE = 0.3;
const BLOCKED_S = 0.3;

/** What the design has found. */
export interface LoopNumbers {
  windowBits: number;
  edgesInSample: number;
  gain: number;
  integralTimeS: number;
}

/** The integers of the wheel loop. */
export function wheelLoopConstants(vehicle: Vehicle, numbers: LoopNumbers): WheelLoopConstants {
  const { windowBits, edgesInSample, gain, integralTimeS } = numbers;
  const periodS = vehicle.board.samplePeriodS;
  const speedPerEdge = (1 << SPEED_BITS) / (edgesInSample * 2 ** windowBits);
  const edgeBits = Math.max(0, Math.floor(Math.log2(INT16_MAX / speedPerEdge)));
  const perSample = periodS / integralTimeS;
  const one = 1 << COEFFICIENT_BITS;
  // at twice full speed something is wrong with the signal; the sums then still fit 16 bits
  // a wheel at the least speed that counts gives two edges in this time
  const slowestEdgesS = (2 * periodS) / (BLOCKED_SPEED_SHARE * edgesInSample);
  const edgeLimit = Math.max(2, Math.ceil(2 * edgesInSample));
  return {
    single: vehicle.encoders?.single ?? false,
    windowBits,
    edgeLimit,
    speedPerEdge: Math.round(speedPerEdge * 2 ** edgeBits),
    edgeBits,
    proportional: Math.min(INT16_MAX, Math.round(gain * (1 << WHEEL_GAIN_BITS))),
    integral: Math.min(one / 4, Math.round(gain * perSample * one)),
    tracking: Math.min(one / 4, Math.round(perSample * one)),
    correctionLimit: Math.round(CORRECTION_SHARE * FULL_SPEED),
    blockedSpeed: Math.round(BLOCKED_SPEED_SHARE * FULL_SPEED),
    blockedSamples: Math.round(Math.max(BLOCKED_S, slowestEdgesS) / periodS),
  };
}
