/**
 * The three ways in which a motor driver takes its commands, as data.
 *
 * pwm-dir: the direction pin gives the side, PWM the speed. pwm-in-in: two direction pins (1,0 forward, 0,1 backward)
 * and PWM on the speed input. dual-pwm: PWM on the input of the side wanted, the other held.
 * Source: the input tables of common dual H-bridge data sheets; common practice.
 */
export type DriverSchemeId = 'pwm-dir' | 'pwm-in-in' | 'dual-pwm';

export type MotorPinKey = 'pwm' | 'dir' | 'in1' | 'in2';

export const MOTOR_PIN_KEYS = ['pwm', 'dir', 'in1', 'in2'] as const satisfies readonly MotorPinKey[];

export interface DriverScheme {
  id: DriverSchemeId;
  /** Pins of one motor, in the order in which people wire them; `pwm` where the pin has to do PWM. */
  motorPins: readonly { key: MotorPinKey; pwm: boolean }[];
  /** Whether the driver has an enable input shared by both motors. */
  standby: boolean;
}

export const DRIVERS: Readonly<Record<DriverSchemeId, DriverScheme>> = {
  'pwm-dir': {
    id: 'pwm-dir',
    motorPins: [
      { key: 'pwm', pwm: true },
      { key: 'dir', pwm: false },
    ],
    standby: false,
  },
  'pwm-in-in': {
    id: 'pwm-in-in',
    motorPins: [
      { key: 'pwm', pwm: true },
      { key: 'in1', pwm: false },
      { key: 'in2', pwm: false },
    ],
    standby: true,
  },
  'dual-pwm': {
    id: 'dual-pwm',
    motorPins: [
      { key: 'in1', pwm: true },
      { key: 'in2', pwm: true },
    ],
    standby: false,
  },
};
