/**
 * Names that a number may have: with its unit at the end, as a pure number by its last word, or listed here with the reason.
 */

const words = (text: string) => text.trim().split(/\s+/);

/** Units at the end of a camel-case name or of a CONSTANT_NAME. */
const UNITS =
  words(`M Mm S Ms Us Mps Mps2 Rad RadS RadPerS Deg V A Ohm N Kg Hz Rpm PerM PerM2 PerTick Percent Khz Bytes Px
  Count Counts Samples Cycles`);
/** Last words of names that are pure numbers; Units are the firmware's, by the scales of controller/constants.ts. */
const PURE = words('Share Shares Fraction Factor Ratio Coefficient Bits Index Steps Units');

const upper = (words: readonly string[]) => words.map((word) => word.toUpperCase());
const ENDS = [...UNITS, ...PURE];
const CAMEL = new RegExp(`[a-z0-9](${ENDS.join('|')})$`);
const CONSTANT = new RegExp(`^[A-Z0-9_]+_(${upper(ENDS).join('|')})$`);
const WHOLE = new RegExp(`^(${[...PURE, 'Count', 'Counts'].join('|').toLowerCase()})$`);

/** Whether a name tells its unit, or that it has none. */
export function tellsUnit(name: string): boolean {
  return CAMEL.test(name) || CONSTANT.test(name) || WHOLE.test(name);
}

interface Listed {
  why: string;
  where: RegExp;
  names: readonly string[];
}

/** Numbers without a unit in their names. */
export const LISTED: readonly Listed[] = [
  {
    why: 'integers of the firmware: their scales stand in controller/constants.ts',
    where: /^controller\//,
    names: [],
  },
  {
    why: 'the same integers on their way into text and tables, and the limits of their types',
    where:
      /^(firmware\/(constant|literals|view|view-classes)|design\/(scales|bound|intervals|edge-table|class-constants|integral-constants|bar-view))\.ts$/,
    names:
      words(`value values largest left right curvature speed speedSlope derivativeFilter proportional derivative magnitude limit
      INT16_MAX INT32_MAX edgeTable highCoverage coefficientOf
      integral integralGain`),
  },
  {
    why: 'places and sizes on a picture or in a terminal: picture units, characters, dots; axes have the unit of what is drawn',
    where: /^(report\/|firmware\/format\.ts|cli\/io\.ts|survey\/(ask|prompt-frame|wrap)\.ts)/,
    names:
      words(`x y x0 y0 x1 y1 left right top width height columns rows fontSize indent hang range parts step stepOf niceStep value
      from to decibels points curves anchors lines apartPoints magnitudePoints phasePoints curveIn clipped filled thinned
      textWidth stateRight barMiddle barWidth zero perBase valueRight kindLeft LINE_WIDTH WIDTH MARGIN LEFT_OF_PLOT BELOW_PLOT`),
  },
  {
    why: 'how many, which one, or a version',
    where: /./,
    names:
      words(`first last state laps seed stream runs finished lost lostInLap resets piece before phase files written drawn
      bit channels ruleRows flashes added removed least most fewest significantDigits DEFAULT_LAPS FULL_PRINT_SENSORS sheetVersion courseVersion
      manifestVersion exitCode items starts i jobs part of partVersion defaultRuns both onlyFirst onlySecond neither chance pairs mean low high CURVE_RUNS CURVE_FACTORS PART_VERSION MOST_RUNS MOST_LAPS MOST_SEED MOST_JOBS`),
  },
  {
    why: 'statistics: mathematics, numbers of runs and chances, in the unit of what it is given',
    where: /^statistics\//,
    names:
      words(`x a b logGamma betaQuantile hits misses runsToShow onlyFirst onlySecond pairedRateChance low high studentQuantile
      differences pairs mean`),
  },
  {
    why: 'the units themselves, as parameters of their conversions',
    where: /^sheet\/units\.ts$/,
    names: words('m mm s ms deg rad rpm percent khz hz'),
  },
  {
    why: 'places in a text and limits of a schema, in the unit of its field',
    where: /^(sheet\/(json-text|schema|words|units|problem)|survey\/.*|cli\/whole-number)\.ts$/,
    names:
      words(`offset line column minimum maximum exclusiveMinimum maxLength minItems maxItems value values parts default
      defaultValue given get number tree valueAt leavesOf a b before after spread pinValues from to`),
  },
  {
    why: 'pins, converter channels, timers and causes of a reset by their numbers, levels 0 and 1, ticks of a clock that wraps',
    where: /^(vehicle\/|sheet\/(sheet-types|defaults|rules\/rule)|rehearsal\/(chip|micropython)-.*|survey\/)/,
    names:
      words(`label sheetLabel pin pins sensorPins buttonPin stopPin standbyPin pinNumber pwm dir in1 in2 gpio number channel timer clockTimer unit
      level cause resetCause lastDriven cycles sample ticks ticksAdd ticksDiff change start end`),
  },
  {
    why: 'cosine and sine of an angle, which an inner loop keeps',
    where: /^rehearsal\/vehicle-motion\.ts$/,
    names: words('cosHeading sinHeading'),
  },
  {
    why: 'places of sensors in the bar, from 0',
    where: /^(firmware\/view-(pins|registers|arduino|micropython)|sheet\/sensor-kinds)\.ts$/,
    names: words('place sensorPlaces analogPlaces'),
  },
  {
    why: 'registers, bits, vectors and sizes of a chip, as its data sheet numbers them',
    where: /^(rehearsal\/chip-model(s|-parts)|vehicle\/board-facts)\.ts$/,
    names: words('bit pinAddress group a b c base capture vector flashWords ramStart mux5 prescaler'),
  },
  {
    why: 'shares and factors with a name of their own in the trade: grip and duty -1..1, trims, relative errors, Ms, margins',
    where: /^(design|vehicle|course|rehearsal|sheet)\//,
    names:
      words(`grip dutyLeft dutyRight startDuty trimLeft trimRight left right finishTarget motorGain gain lag coverage
      weakestPeak gainMargin ms loopPeak quickPeak closedLoopRadius relativeError timeChange READING_ERROR READING_NOISE
      driftLeft driftRight frictionLeft frictionRight stiction castorDrag contrast ambient
      sinc x u noise SHARES`),
  },
  {
    why: 'readings of a sensor as its board gives them, counts or levels',
    where: /^(vehicle|rehearsal|sheet)\//,
    names: words('ground line out'),
  },
  {
    why: 'mathematics in the unit of what it is given: staircases and their harmonics, polynomials, medians, random numbers, plane geometry',
    where:
      /^(design\/(describing-function|sampled-controller|classic-rules|comparison|quantisation|loop-marks)|rehearsal\/(random|metrics)|vehicle\/sensor-bar|sheet\/rules\/bend|design\/golden-section)\.ts$/,
    names:
      words(`at height amplitude largest largestGain cycleAmplitudes describingGain gain ultimateGain slope curvature a b productOf
      sumOf numerator denominator controllerResponse wanted held margin s0 s1 s2 s3 low high uniform normal values median
      pitch evenPositions offset value lineWidth spotRadius seeingReach ahead seen radius cutPath tightestRadius tightestCutRadius`),
  },
  {
    why: 'matrices and responses, whose entries differ in unit: the equation stands in the module',
    where: /^design\/lane-plant\.ts$/,
    names: words('phi12 phi13 phi23 phi33 gamma0 gamma1 plantResponse'),
  },
  {
    why: 'results and fields named by what they are, with the unit in their comment',
    where: /^(design|course|sheet|report)\//,
    names: words(`motor view control tableGain proportional proportionalRange frequencyGrid runInterval
      interval runsOf top wholeDelay wrapAngle toTable strips positionsOf left right bottom columns rows`),
  },
  {
    why: 'encoders: lines of a disc and edges are counted; their pins by the letters of their channels; the shares of a sampled lag',
    where:
      /^(sheet\/sheet-types|vehicle\/(encoder|pin-plan)|design\/wheel-loop-.*|rehearsal\/chip-encoders)\.ts$/,
    names: words('linesPerTurn a b edgesInSample kept late early edgesAtTop fromCycle encoderChannels'),
  },
  {
    why: 'the page of a rehearsal: places on an axis in the unit of its quantity, shades, widths in its own drawing units, parts of a text',
    where: /^report\/html\/.*\.ts$/,
    names: words('STRETCHES words values every opacity end at roundUp BROAD SLIM'),
  },
];
