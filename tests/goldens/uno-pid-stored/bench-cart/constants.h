// Part of the firmware of bench-cart. Written by fairlead 0.1.0; change the build sheet, not
// this file.
//
// The numbers of this vehicle. A name that ends in _Qn holds its quantity times 2^n:
// 608 in HALF_LINE_MM_Q6 is 9.5 mm. Offsets to the left and turns to the left are positive.
#pragma once

#include <stdint.h>

// Time

// Period of the control loop, us: 500 samples a second. From target.board.
constexpr uint32_t SAMPLE_PERIOD_US = 2000UL;
// From the button to the first motion: 0.5 s. From start.countdownS.
constexpr uint16_t COUNTDOWN_SAMPLES = 250;
// Longest run: 120 s. From start.runLimitS.
constexpr uint32_t RUN_LIMIT_SAMPLES = 60000UL;
// How long the button must keep its level to count: 20 ms. Common practice.
constexpr uint8_t DEBOUNCE_SAMPLES = 10;
// Samples of one run that may begin a whole period late before the run is stopped. Common
// practice.
constexpr uint16_t OVERRUN_LIMIT = 20;
// Length of one flash and of one pause of the LED: 0.2 s. Common practice.
constexpr uint16_t BLINK_SAMPLES = 100;

// Scales of the integers

// Coverage of a sensor whose spot lies wholly on the line.
constexpr uint8_t FULL_COVERAGE_255THS = 255;
// Duty of a motor at full voltage.
constexpr int16_t FULL_DUTY_Q12 = 4096;
// Bits of the coverage per count beyond coverage.
constexpr uint8_t CALIBRATION_BITS = 12;
// Bits of the edge table: 4096 is half the way between two sensors.
constexpr uint8_t EDGE_BITS = 12;
// Bits of coverage from one entry of the edge table to the next.
constexpr uint8_t EDGE_STEP_BITS = 5;
// Bits of a gap's half width beyond those of an offset.
constexpr uint8_t GAP_HALF_BITS = 3;
// Bits that a filtered value has beyond its input.
constexpr uint8_t FILTER_BITS = 4;
// Bits of the filter and motor model coefficients.
constexpr uint8_t COEFFICIENT_BITS = 15;
// Bits of a curvature beyond 1/m.
constexpr uint8_t CURVATURE_BITS = 8;
// Bits of a speed: 8192 is the speed at full duty.
constexpr uint8_t SPEED_BITS = 13;
// Bits of a class's speed; the two more make the firmware close a speed error 4 times as fast
// as the motors.
constexpr uint8_t CLASS_SPEED_BITS = 15;
// Bits of the modelled speed.
constexpr uint8_t SPEED_MODEL_BITS = 29;
// Bits of a class's speed slope.
constexpr uint8_t SPEED_SLOPE_BITS = 8;
// Bits of the half track width beyond m, and of a turn for each speed.
constexpr uint8_t TRACK_BITS = 14;
// Bits of the duty for each speed, in units of both.
constexpr uint8_t SLOPE_BITS = 15;

// Sensor bar

// Sensors of the bar. From sensors.count.
constexpr uint8_t SENSOR_COUNT = 6;
// Reading of each sensor over ground, counts. From sensors.calibration.ground.
constexpr int16_t GROUND_COUNTS[] = {123, 123, 123, 123, 123, 123};
// Share of a sensor on the line for each count above ground; negative where the line reads
// lower. From sensors.calibration.
constexpr int16_t COVERAGE_255THS_PER_COUNT_Q12[] = {1459, 1459, 1459, 1459, 1459, 1459};
// Half way between neighbouring sensors, from the left, with one place beyond each end; mm left
// of the centre line. From sensors.pitchMm or positionsMm.
constexpr int16_t GAP_MIDDLE_MM_Q6[] = {1920, 1280, 640, 0, -640, -1280, -1920};
// Half the way between neighbouring sensors, same places. From sensors.pitchMm or positionsMm.
constexpr int16_t GAP_HALF_MM_Q9[] = {2560, 2560, 2560, 2560, 2560, 2560, 2560};
// Where an edge of the line lies between two sensors, by the sum of their coverages; the spots
// are discs. From sensors.spotRadiusMm and pitchMm.
constexpr int16_t EDGE_TABLE_Q12[] = {-7373, -6199, -5436, -4757, -4106, -3456, -2778, -2019, 0,
                                      2019,  2778,  3456,  4106,  4757,  5436,  6199,  7373};
// Coverage from which a sensor counts as on the line: 50.2 %. From line.widthMm,
// sensors.pitchMm and spotRadiusMm.
constexpr uint8_t HIGH_COVERAGE_255THS = 128;
// Coverage of an end sensor from which a line just outside the bar is still measured: 14.9 %.
constexpr uint8_t LOW_COVERAGE_255THS = 38;
// Half the width of the line: 9.5 mm. From line.widthMm.
constexpr int16_t HALF_LINE_MM_Q6 = 608;
// Width of line reaching an end of the bar from which it is taken for a corner: 34.34 mm. From
// line.widthMm and tightestRadiusMm.
constexpr int16_t CORNER_WIDTH_MM_Q6 = 2198;
// Sum of coverages from which the bar lies on a crossing: 3.435 sensors. From line.widthMm and
// sensors.pitchMm.
constexpr int16_t WIDE_COVERAGE_255THS = 876;

// Steering

// Bits of the gains of the speed classes.
constexpr uint8_t GAIN_BITS = 13;
// Filter of the curvature demand that picks the speed class; time constant 6 ms.
constexpr int16_t DEMAND_FILTER_Q15 = 9289;
// Filter of the curvature that is held over gaps and crossings; time constant 60 ms.
constexpr int16_t HOLD_FILTER_Q15 = 1074;
// Largest curvature commanded: 33.3 per m. From drive.trackWidthMm.
constexpr int16_t CURVATURE_LIMIT_PER_M_Q8 = 8533;
// Curvature of the search for a lost line: 16.7 per m. From drive.trackWidthMm and
// line.tightestRadiusMm.
constexpr int16_t SEARCH_CURVATURE_PER_M_Q8 = 4267;

// Drive

// Half the track width: 60 mm. From drive.trackWidthMm.
constexpr int16_t HALF_TRACK_M_Q14 = 983;
// Wheel speed at full duty, of which all speeds are shares: 1.5 m/s. From drive.motor,
// drive.wheelDiameterMm and power.nominalV.
constexpr int16_t FULL_SPEED_Q13 = 8191;
// Wheel speed up to which a wheel is left without duty: 0.015 m/s.
constexpr int16_t WHEEL_DEAD_SPEED_Q13 = 82;
// Share of a speed difference that the motors make up in one sample; time constant 80 ms. From
// drive.motor.timeConstantMs.
constexpr int16_t MOTOR_STEP_Q15 = 809;
// Speed command above the present speed when speeding up: 0.395 m/s. From
// drive.gripCoefficient.
constexpr int16_t LEAD_UP_SPEED_Q13 = 2160;
// Speed command below the present speed when braking: 0.417 m/s. From drive.gripCoefficient.
constexpr int16_t LEAD_DOWN_SPEED_Q13 = 2280;
// Speed of the search for a lost line: 0.344 m/s. From drive.gripCoefficient.
constexpr int16_t SEARCH_SPEED_Q15 = 7525;
// Duty at which the left wheel begins to turn: 10 %. From drive.motor.startDutyPercent and
// trim.
constexpr int16_t START_DUTY_LEFT_Q12 = 410;
// Duty at which the right wheel begins to turn: 10 %. From drive.motor.startDutyPercent and
// trim.
constexpr int16_t START_DUTY_RIGHT_Q12 = 410;
// Duty of the left wheel for each speed beyond that, both as shares. From drive.motor and trim.
constexpr int16_t DUTY_LEFT_PER_SPEED_Q14 = 14746;
// Duty of the right wheel for each speed beyond that, both as shares. From drive.motor and
// trim.
constexpr int16_t DUTY_RIGHT_PER_SPEED_Q14 = 14746;

// Memory of the line

// Offset beyond which a vanished line has left by that side: 24.75 mm. From sensors and
// line.widthMm.
constexpr int16_t SIDE_OFFSET_MM_Q6 = 1584;
// Way over which a vanished line is taken for a gap: 70 mm, as a sum of speeds over samples.
// From line.longestGapMm.
constexpr int32_t GAP_SPEED_Q13_SAMPLES = 191173L;
// Way over which a crossing may last: 65 mm. From line.widthMm.
constexpr int32_t CROSSING_SPEED_Q13_SAMPLES = 177517L;
// Way after a corner on which a vanished line is looked for on its side: 46 mm. From
// line.widthMm.
constexpr int32_t CORNER_SPEED_Q13_SAMPLES = 125628L;
// Way out of a bend before a faster class is taken: 26.3 mm. From sensors.aheadOfAxleMm.
constexpr int32_t RELEASE_SPEED_Q13_SAMPLES = 71690L;
// Longest search for a lost line: 1.21 s; then the vehicle stops. From drive and
// line.tightestRadiusMm.
constexpr uint16_t SEARCH_SAMPLES = 603;

// Speed classes

struct SpeedClass {
  int16_t curvaturePerMQ8;  // largest curvature of the class
  int16_t speedQ15;         // speed at that curvature
  int16_t
      speedSlope;  // speed gained for each step of curvature below that, SPEED_SLOPE_BITS more bits
  int16_t proportional;  // curvature for each step of offset, GAIN_BITS more bits
  int16_t derivative;    // the same for its change, FILTER_BITS fewer bits
  int16_t derivativeFilterQ15;
};

// From speeds.classes, the fastest first.
constexpr SpeedClass SPEED_CLASSES[] = {
    // straight: bends from 3600 mm radius at 1.26 m/s, limited by the finish target
    {71, 27482, 0, 11650, 11087, 12893},
    // sweeping: bends from 960 mm radius at 1.26 m/s, limited by the finish target
    {267, 27482, 0, 11633, 11160, 12893},
    // wide: bends from 480 mm radius at 1.26 m/s, limited by the finish target
    {533, 27482, 0, 11579, 11251, 12893},
    // open: bends from 288 mm radius at 1.22 m/s, limited by the motors
    {889, 26576, 651, 11450, 11354, 12893},
    // medium: bends from 180 mm radius at 1.1 m/s, limited by the motors
    {1422, 24084, 1196, 11121, 11526, 12893},
    // tight: bends from 120 mm radius at 0.908 m/s, limited by grip
    {2133, 19830, 1531, 11516, 12023, 12893},
    // reserve: bends from 90 mm radius at 0.786 m/s, limited by grip
    {2844, 17173, 956, 11516, 12253, 12893},
};
constexpr uint8_t CLASS_COUNT = sizeof SPEED_CLASSES / sizeof SPEED_CLASSES[0];

// What must hold between them

template <typename T, uint32_t N>
constexpr uint32_t entriesOf(const T (&)[N]) {
  return N;
}
static_assert(entriesOf(GAP_MIDDLE_MM_Q6) == SENSOR_COUNT + 1, "one place for each gap of the bar");
static_assert(entriesOf(GAP_HALF_MM_Q9) == SENSOR_COUNT + 1, "one width for each gap of the bar");
constexpr uint8_t EDGE_ENTRIES = entriesOf(EDGE_TABLE_Q12);
static_assert((EDGE_ENTRIES - 1) << EDGE_STEP_BITS > 2 * FULL_COVERAGE_255THS + 1,
              "the edge table covers every sum, up to two full coverages");
static_assert(entriesOf(GROUND_COUNTS) == SENSOR_COUNT, "one reading over ground for each sensor");
static_assert(entriesOf(COVERAGE_255THS_PER_COUNT_Q12) == SENSOR_COUNT, "one gain for each sensor");
static_assert(0 < LOW_COVERAGE_255THS && LOW_COVERAGE_255THS <= HIGH_COVERAGE_255THS,
              "thresholds in order");
static_assert(DEBOUNCE_SAMPLES > 0, "a button that has to be seen");

constexpr bool classesInOrder(uint8_t i) {
  return i == CLASS_COUNT ||
         (SPEED_CLASSES[i - 1].curvaturePerMQ8 <= SPEED_CLASSES[i].curvaturePerMQ8 &&
          classesInOrder(static_cast<uint8_t>(i + 1)));
}
static_assert(classesInOrder(1), "each class is for tighter bends than the one before");

// No product leaves 32 bits, and what is kept or multiplied not 16: the largest values of each

constexpr bool fits(int64_t value) {
  return value <= INT32_MAX;
}
constexpr bool fits16(int64_t value) {
  return value <= INT16_MAX;
}

constexpr bool coveragesFit(uint8_t i) {
  return i == SENSOR_COUNT || (fits(int64_t{1023} * (COVERAGE_255THS_PER_COUNT_Q12[i] < 0
                                                         ? -COVERAGE_255THS_PER_COUNT_Q12[i]
                                                         : COVERAGE_255THS_PER_COUNT_Q12[i])) &&
                               coveragesFit(static_cast<uint8_t>(i + 1)));
}
static_assert(coveragesFit(0), "reading times coverage per count");
constexpr bool edgesFit(uint8_t i) {
  return i > SENSOR_COUNT || (fits(int64_t{GAP_HALF_MM_Q9[i]} * EDGE_TABLE_Q12[EDGE_ENTRIES - 1]) &&
                              edgesFit(static_cast<uint8_t>(i + 1)));
}
static_assert(edgesFit(0), "half gap times edge table");
constexpr bool edgeStepsFit(uint8_t i) {
  return i == EDGE_ENTRIES || (fits16(int32_t{EDGE_TABLE_Q12[i]} - EDGE_TABLE_Q12[i - 1]) &&
                               edgeStepsFit(static_cast<uint8_t>(i + 1)));
}
static_assert(edgeStepsFit(1), "from one entry of the edge table to the next");
constexpr bool classFits(const SpeedClass& each) {
  return fits(int64_t{INT16_MAX} * (int64_t{each.proportional} + each.derivative)) &&
         fits(int64_t{each.curvaturePerMQ8} * each.speedSlope) && fits16(2L * each.curvaturePerMQ8);
}
constexpr bool classesFit(uint8_t i) {
  return i == CLASS_COUNT ||
         (classFits(SPEED_CLASSES[i]) && classesFit(static_cast<uint8_t>(i + 1)));
}
static_assert(classesFit(0), "gains, speed slopes and curvatures");
// Down from a wider class's speed to the next one's: what a slope gains never passes the wider one.
constexpr bool slopesFit(uint8_t i) {
  return i == CLASS_COUNT ||
         (SPEED_CLASSES[i].speedQ15 + ((int64_t{SPEED_CLASSES[i].curvaturePerMQ8 -
                                                SPEED_CLASSES[i - 1].curvaturePerMQ8} *
                                        SPEED_CLASSES[i].speedSlope) >>
                                       SPEED_SLOPE_BITS) <=
              INT16_MAX &&
          slopesFit(static_cast<uint8_t>(i + 1)));
}
static_assert(slopesFit(1), "speed of a class with what its slope gains");
static_assert(fits16(2L * CURVATURE_LIMIT_PER_M_Q8), "change of curvature");
static_assert(fits16(2L * SEARCH_CURVATURE_PER_M_Q8), "curvature of the search");
constexpr int64_t largerOf(int64_t a, int64_t b) {
  return a > b ? a : b;
}
// Divided by 2^bits, rounded up.
constexpr int64_t shiftedUp(int64_t value, uint8_t bits) {
  return (value + (int64_t{1} << bits) - 1) >> bits;
}
constexpr int64_t largestTurnQ14() {
  return shiftedUp(largerOf(CURVATURE_LIMIT_PER_M_Q8, SEARCH_CURVATURE_PER_M_Q8) * HALF_TRACK_M_Q14,
                   CURVATURE_BITS);
}
constexpr int64_t largestHalfQ13() {
  return shiftedUp(FULL_SPEED_Q13 * largestTurnQ14(), TRACK_BITS);
}
constexpr int64_t largestBaseQ13() {
  return largerOf(2L * FULL_SPEED_Q13,
                  FULL_SPEED_Q13 + largerOf(LEAD_UP_SPEED_Q13, LEAD_DOWN_SPEED_Q13));
}
static_assert(fits16(largestTurnQ14()), "turn for each speed");
static_assert(fits16(2 * largestHalfQ13()), "inner wheel behind the outer one");
static_assert(fits16(largestBaseQ13() + largestHalfQ13()), "wheel speed before its limits");
static_assert(fits16(4L * FULL_SPEED_Q13), "change of speed");
static_assert(fits(GAP_SPEED_Q13_SAMPLES + FULL_SPEED_Q13), "way in a gap");
static_assert(fits(CROSSING_SPEED_Q13_SAMPLES + FULL_SPEED_Q13), "way on a crossing");
static_assert(fits(CORNER_SPEED_Q13_SAMPLES + FULL_SPEED_Q13), "way after a corner");
static_assert(fits(RELEASE_SPEED_Q13_SAMPLES + FULL_SPEED_Q13), "way out of a bend");
static_assert(fits(int64_t{SEARCH_SAMPLES} * FULL_SPEED_Q13), "way of a search");
