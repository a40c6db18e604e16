// Made from schemas/sheet.schema.json by `npm run types`; do not edit.

/**
 * A pin's label as printed on the board: a number, or text such as A0 or GP26.
 */
export type Pin = number | string;
/**
 * One reading a sensor, leftmost first, in counts of the board's converter as the firmware reads it: 0 to 1023 with Arduino C++, 0 to 4095 on pico and esp32. [counts]
 *
 * @minItems 2
 * @maxItems 16
 *
 * Items: One sensor's reading. [counts]
 */
export type Counts = number[];

/**
 * One small line-tracking vehicle and how it is to drive: the only input of the design.
 */
export interface Sheet {
  /**
   * Where editors find this schema; a copy is written beside every sheet.
   */
  $schema?: string;
  /**
   * Version of this file format.
   */
  sheetVersion: 1;
  /**
   * Names the firmware folder and sketch: a letter first, then letters, digits, hyphen or underscore, 40 characters at most.
   */
  name: string;
  /**
   * The controller board and the language of the firmware.
   */
  target: {
    /**
     * The controller board: uno, nano, mega2560 and leonardo take Arduino C++, pico and esp32 take MicroPython.
     */
    board: 'uno' | 'nano' | 'mega2560' | 'leonardo' | 'pico' | 'esp32';
    /**
     * The language of the firmware. It follows from the board.
     */
    language: 'arduino' | 'micropython';
  };
  /**
   * The tape or paint that the vehicle follows.
   */
  line: {
    /**
     * Whether the line is lighter or darker than the ground.
     */
    polarity: 'light-on-dark' | 'dark-on-light';
    /**
     * Width of the line, across it. [mm]
     */
    widthMm: number;
    /**
     * Centre-line radius of the tightest bend on any lane. [mm]
     */
    tightestRadiusMm: number;
    /**
     * Longest break in the line that is to be crossed straight on; 0 if there is none. [mm]
     */
    longestGapMm?: number;
    /**
     * Whether lanes cross each other.
     */
    crossings?: boolean;
  };
  /**
   * The row of reflectance sensors ahead of the axle, listed left to right in driving direction.
   */
  sensors: {
    /**
     * analog: a voltage that follows the reflection. digital: one level over line, the other over ground. mixed: some of each, as kinds lists them.
     */
    kind: 'analog' | 'digital' | 'mixed';
    /**
     * Mixed bars only: analog or digital, leftmost sensor first; such as digital ones at the sides of an analog middle.
     *
     * @minItems 2
     * @maxItems 16
     *
     * Items: analog or digital.
     */
    kinds?: ('analog' | 'digital')[];
    /**
     * Number of sensors in the row. [1]
     */
    count: number;
    /**
     * Centre to centre between neighbouring sensors of an evenly spaced row. [mm]
     */
    pitchMm?: number;
    /**
     * Instead of a spacing: each sensor's distance left of the centre line, leftmost first, right of it negative. [mm]
     *
     * @minItems 2
     * @maxItems 16
     *
     * Items: Distance left of the centre line. [mm]
     */
    positionsMm?: number[];
    /**
     * Distance from the wheel axle forward to the row of sensors. [mm]
     */
    aheadOfAxleMm: number;
    /**
     * Radius of the patch of floor that one sensor sees. [mm]
     */
    spotRadiusMm?: number;
    /**
     * Board label of each sensor's pin, leftmost sensor first.
     *
     * @minItems 2
     * @maxItems 16
     */
    pins: Pin[];
    /**
     * Digital sensors, also those of a mixed bar: the level of the pin while the sensor is over the line.
     */
    lineLevel?: 'high' | 'low';
    /**
     * How the readings over ground and over line become known.
     */
    calibration?: {
      /**
       * stored: the readings below are used. sweep: after the button the vehicle turns the bar across the line and measures them.
       */
      mode: 'stored' | 'sweep';
      ground?: Counts;
      line?: Counts;
    };
  };
  /**
   * Two driven wheels on one axle, their motors and the motor driver.
   */
  drive: {
    /**
     * Distance between the middles of the two driven tyres. [mm]
     */
    trackWidthMm: number;
    /**
     * Diameter of the driven wheels, tyre included. [mm]
     */
    wheelDiameterMm: number;
    /**
     * Mass of the vehicle as it drives, battery and load included. [kg]
     */
    massKg?: number;
    /**
     * Friction coefficient of tyre on floor: the tangent of the angle at which the vehicle, wheels blocked, starts to slide on a tilted board of the same floor. [1]
     */
    gripCoefficient: number;
    /**
     * Figures of one drive motor with its gearbox, from its data sheet.
     */
    motor: {
      /**
       * Speed of the output shaft without load at the rated voltage. [rpm]
       */
      noLoadRpm: number;
      /**
       * Voltage at which the data sheet states the no-load speed. [V]
       */
      ratedVoltageV: number;
      /**
       * Time in which wheel speed reaches 63 % of a step, on the floor with the vehicle's load. [ms]
       */
      timeConstantMs: number;
      /**
       * Duty cycle at which the wheels just begin to turn on the floor. [%]
       */
      startDutyPercent?: number;
      /**
       * Current of one motor, blocked, at the rated voltage. [A]
       */
      stallCurrentA?: number;
    };
    /**
     * How the board drives the two motors.
     */
    driver: {
      /**
       * pwm-dir: one PWM and one direction pin a motor. pwm-in-in: one PWM and two direction pins. dual-pwm: two PWM pins.
       */
      scheme: 'pwm-dir' | 'pwm-in-in' | 'dual-pwm';
      left: MotorPins;
      right: MotorPins;
      /**
       * A pin's label as printed on the board: a number, or text such as A0 or GP26.
       */
      standbyPin?: number | string;
      /**
       * Highest PWM frequency that the driver takes, by its data sheet. [kHz]
       */
      maxPwmKhz?: number;
    };
    /**
     * Factor on each wheel's commanded duty, for a vehicle that pulls to one side.
     */
    trim?: {
      /**
       * Factor on the left wheel's duty. [%]
       */
      leftPercent?: number;
      /**
       * Factor on the right wheel's duty. [%]
       */
      rightPercent?: number;
    };
  };
  /**
   * Edges counted on both wheels. With them each wheel is held to its wanted speed, whatever battery and motor do.
   */
  encoders?: {
    /**
     * single: one signal a wheel; the direction is taken from the command. quadrature: two signals a quarter line apart, which tell the direction too.
     */
    channels: 'single' | 'quadrature';
    /**
     * Pulses of one channel while the wheel turns once: lines of the disc times the gear ratio, if the disc sits on the motor. Both edges of each are counted. [1]
     */
    linesPerTurn: number;
    left: EncoderPins;
    right: EncoderPins;
  };
  /**
   * An LED of your own that shows state and fault codes; left out, it is the board's own, where its pin is free.
   */
  led?: {
    /**
     * A pin's label as printed on the board: a number, or text such as A0 or GP26.
     */
    pin: number | string;
    /**
     * Whether the LED lights while the pin is low: wired from the supply to the pin instead of from the pin to ground.
     */
    activeLow?: boolean;
  };
  /**
   * The battery, as it arrives at the motor driver.
   */
  power: {
    /**
     * Battery voltage for which the vehicle is designed. [V]
     */
    nominalV: number;
    /**
     * Battery voltage freshly charged. [V]
     */
    fullV: number;
    /**
     * Battery voltage at which the vehicle is taken out of use. [V]
     */
    emptyV: number;
  };
  /**
   * How the sensors become wheel speeds.
   */
  control: {
    /**
     * pid: feedback on the measured offset. rules: a table with one action for each sensor state.
     */
    kind: 'pid' | 'rules';
    /**
     * Rules only: how the state changed since the sample before damps the steering. Without it each state alone decides.
     */
    stateMemory?: boolean;
    /**
     * Rules only: the steps of the table may let the vehicle swing about the line by at most this much at the bar; the wheel-speed proportion is chosen to keep it. [mm]
     */
    swingMm?: number;
    /**
     * Takes up what unequal motors do, so that the line stays in the middle of the bar; with the controller kind pid. auto: only where the tolerance of the motors would hold the line too far beside it.
     */
    integral?: 'auto' | 'always' | 'never';
    /**
     * Actions of your own for single states of the rule table, in place of the computed ones; with the controller kind rules only.
     *
     * @minItems 1
     * @maxItems 136
     *
     * Items: One state of the bar and what the wheels do in it.
     */
    overrides?: {
      /**
       * One digit a sensor, leftmost first: 1 on the line, 0 off it. The ones stand together: other states follow from these.
       */
      state: string;
      /**
       * Speed of the left wheel as a fraction of the class's speed; negative is backward. [1]
       */
      left: number;
      /**
       * Speed of the right wheel as a fraction of the class's speed; negative is backward. [1]
       */
      right: number;
    }[];
    /**
     * Steering gains of your own for every speed class, in place of the computed ones: curvature = gain x (offset + derivative time x its rate). The design judges them by the same measures.
     */
    gains?: {
      /**
       * Curvature of the path for each metre that the line lies to the side at the bar. [1/m^2]
       */
      proportionalPerM2: number;
      /**
       * Time by which the offset is looked ahead along its rate. [ms]
       */
      derivativeTimeMs: number;
      /**
       * Way over which the integral part makes as much curvature as the proportional one; without it there is no integral part. [mm]
       */
      integralDistanceMm?: number;
      /**
       * Time constant of the filter on the derivative. [ms]
       */
      filterTimeMs?: number;
    };
  };
  /**
   * How fast each kind of bend is driven.
   */
  speeds: {
    /**
     * auto: computed from grip, motor, view and control limits. Or a list, each class for bends of at least its radius.
     */
    classes:
      | 'auto'
      | {
          /**
           * Short name of the class.
           */
          name: string;
          /**
           * The class serves bends of at least this centre-line radius. [mm]
           */
          minRadiusMm?: number;
          /**
           * In place of the radius: the class serves bends that turn by at most this angle within this length of lane.
           */
          sharpness?: {
            /**
             * Angle by which the lane turns. [deg]
             */
            turnDeg: number;
            /**
             * Length along the centre line in which it turns. [mm]
             */
            withinMm: number;
          };
          /**
           * Speed of the axle's middle in such bends. [m/s]
           */
          speedMps: number;
        }[];
    /**
     * Share of perturbed rehearsals that must finish. [%]
     */
    finishTargetPercent?: number;
  };
  /**
   * How a run begins and ends.
   */
  start: {
    /**
     * A pin's label as printed on the board: a number, or text such as A0 or GP26.
     */
    buttonPin: number | string;
    /**
     * Time between pressing the button and the first motion. [s]
     */
    countdownS?: number;
    /**
     * The vehicle stops after this time in any case. [s]
     */
    runLimitS?: number;
  };
  /**
   * A pin's label as printed on the board: a number, or text such as A0 or GP26.
   */
  stopPin?: number | string;
  /**
   * What the vehicle reports while it drives.
   */
  telemetry?: {
    /**
     * off: nothing is sent.
     */
    mode: 'off';
  };
  /**
   * How far the real vehicle may differ from the figures above, either way.
   */
  tolerances?: {
    /**
     * Spread of each motor's speed at a given duty. [%]
     */
    motorGainPercent?: number;
    /**
     * Spread of the motor time constant. [%]
     */
    timeConstantPercent?: number;
    /**
     * Spread of the grip coefficient: dust, wear, damp. [%]
     */
    gripPercent?: number;
  };
}
/**
 * Pins of one motor: pwm and dir; or pwm, in1 and in2; or in1 and in2, as the driver scheme has them.
 */
export interface MotorPins {
  /**
   * A pin's label as printed on the board: a number, or text such as A0 or GP26.
   */
  pwm?: number | string;
  /**
   * A pin's label as printed on the board: a number, or text such as A0 or GP26.
   */
  dir?: number | string;
  /**
   * A pin's label as printed on the board: a number, or text such as A0 or GP26.
   */
  in1?: number | string;
  /**
   * A pin's label as printed on the board: a number, or text such as A0 or GP26.
   */
  in2?: number | string;
  /**
   * Set if this wheel turns backward when told to go forward.
   */
  inverted?: boolean;
}
/**
 * Pins of one encoder: a, and b with quadrature.
 */
export interface EncoderPins {
  /**
   * A pin's label as printed on the board: a number, or text such as A0 or GP26.
   */
  a: number | string;
  /**
   * A pin's label as printed on the board: a number, or text such as A0 or GP26.
   */
  b?: number | string;
  /**
   * True if the count falls while the wheel turns forward; quadrature only.
   */
  inverted?: boolean;
}
