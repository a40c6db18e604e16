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
constexpr int16_t FULL_COVERAGE_Q8 = 256;
// Duty of a motor at full voltage.
constexpr int16_t FULL_DUTY_Q12 = 4096;
// Bits of the coverage per count beyond coverage.
constexpr uint8_t CALIBRATION_BITS = 12;
// Bits of the edge table: 1024 is half the way between two sensors.
constexpr uint8_t EDGE_BITS = 10;
// Bits of coverage from one entry of the edge table to the next.
constexpr uint8_t EDGE_STEP_BITS = 5;
// Entries of the edge table.
constexpr uint8_t EDGE_ENTRIES = 17;
// Bits that a filtered value has beyond its input.
constexpr uint8_t FILTER_BITS = 4;
// Bits of the filter and motor model coefficients.
constexpr uint8_t COEFFICIENT_BITS = 15;
// Bits of a modelled speed beyond mm/s.
constexpr uint8_t SPEED_BITS = 6;
// Bits of a curvature beyond 1/m.
constexpr uint8_t CURVATURE_BITS = 8;
// Bits of a class's speed slope.
constexpr uint8_t SPEED_SLOPE_BITS = 4;
// How much faster than the motors a small speed error is closed: 2^n times.
constexpr uint8_t SPEED_GAIN_BITS = 2;
// Bits dropped from a speed difference before the motor model's product.
constexpr uint8_t SPEED_MODEL_BITS = 4;
// Bits of the half track width beyond m.
constexpr uint8_t TRACK_BITS = 16;
// Bits of the duty per wheel speed beyond duty.
constexpr uint8_t SLOPE_BITS = 12;

// Sensor bar

// Sensors of the bar. From sensors.count.
constexpr uint8_t SENSOR_COUNT = 6;
// Reading of each sensor over ground, counts. From sensors.calibration.ground.
constexpr int16_t GROUND_COUNTS[] = {123, 123, 123, 123, 123, 123};
// Share of a sensor on the line for each count above ground; negative where the line reads
// lower. From sensors.calibration.
constexpr int16_t COVERAGE_PER_COUNT_Q20[] = {1464, 1464, 1464, 1464, 1464, 1464};
// Half way between neighbouring sensors, from the left, with one place beyond each end; mm left
// of the centre line. From sensors.pitchMm or positionsMm.
constexpr int16_t GAP_MIDDLE_MM_Q6[] = {1920, 1280, 640, 0, -640, -1280, -1920};
// Half the way between neighbouring sensors, same places. From sensors.pitchMm or positionsMm.
constexpr int16_t GAP_HALF_MM_Q6[] = {320, 320, 320, 320, 320, 320, 320};
// Where an edge of the line lies between two sensors, by the sum of their coverages; the spots
// are discs. From sensors.spotRadiusMm and pitchMm.
constexpr int16_t EDGE_TABLE_Q10[] = {-1843, -1544, -1355, -1186, -1024, -862, -693, -504, 0,
                                      504,   693,   862,   1024,  1186,  1355, 1544, 1843};
// Coverage from which a sensor counts as on the line: 50 %. From line.widthMm, sensors.pitchMm
// and spotRadiusMm.
constexpr int16_t HIGH_COVERAGE_Q8 = 128;
// Coverage of an end sensor from which a line just outside the bar is still measured: 14.8 %.
constexpr int16_t LOW_COVERAGE_Q8 = 38;
// Half the width of the line: 9.5 mm. From line.widthMm.
constexpr int16_t HALF_LINE_MM_Q6 = 608;
// Width of line reaching an end of the bar from which it is taken for a corner: 34.34 mm. From
// line.widthMm and tightestRadiusMm.
constexpr int16_t CORNER_WIDTH_MM_Q6 = 2198;
// Sum of coverages from which the bar lies on a crossing: 3.434 sensors. From line.widthMm and
// sensors.pitchMm.
constexpr int16_t WIDE_COVERAGE_Q8 = 879;

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
constexpr int16_t HALF_TRACK_M_Q16 = 3932;
// Largest turn rate commanded, mrad/s. From drive.motor and drive.trackWidthMm.
constexpr int32_t TURN_LIMIT_MRAD_S = 27496L;
// Wheel speed at full duty, mm/s. From drive.motor, drive.wheelDiameterMm and power.nominalV.
constexpr int16_t WHEEL_LIMIT_MM_S = 1500;
// Wheel speed up to which a wheel is left without duty, mm/s.
constexpr int16_t WHEEL_DEAD_MM_S = 15;
// Share of a speed difference that the motors make up in one sample; time constant 80 ms. From
// drive.motor.timeConstantMs.
constexpr int16_t MOTOR_STEP_Q15 = 809;
// Speed command above the present speed when speeding up: 0.395 m/s. From
// drive.gripCoefficient.
constexpr int32_t LEAD_UP_MM_S_Q6 = 25306L;
// Speed command below the present speed when braking: 0.417 m/s. From drive.gripCoefficient.
constexpr int32_t LEAD_DOWN_MM_S_Q6 = 26712L;
// Speed of the search for a lost line: 0.344 m/s. From drive.gripCoefficient.
constexpr int32_t SEARCH_SPEED_MM_S_Q6 = 22043L;
// Duty at which the left wheel begins to turn: 10 %. From drive.motor.startDutyPercent and
// trim.
constexpr int16_t START_DUTY_LEFT_Q12 = 410;
// Duty at which the right wheel begins to turn: 10 %. From drive.motor.startDutyPercent and
// trim.
constexpr int16_t START_DUTY_RIGHT_Q12 = 410;
// Duty of the left wheel for each mm/s beyond that. From drive.motor, drive.wheelDiameterMm and
// trim.
constexpr int16_t DUTY_LEFT_PER_MM_S_Q24 = 10066;
// Duty of the right wheel for each mm/s beyond that. From drive.motor, drive.wheelDiameterMm
// and trim.
constexpr int16_t DUTY_RIGHT_PER_MM_S_Q24 = 10066;

// Memory of the line

// Offset beyond which a vanished line has left by that side: 24.75 mm. From sensors and
// line.widthMm.
constexpr int16_t SIDE_OFFSET_MM_Q6 = 1584;
// Way over which a vanished line is taken for a gap: 70 mm, as a sum of speeds over samples.
// From line.longestGapMm.
constexpr int32_t GAP_MM_S_Q6_SAMPLES = 2240000L;
// Way over which a crossing may last: 65 mm. From line.widthMm.
constexpr int32_t CROSSING_MM_S_Q6_SAMPLES = 2080000L;
// Way after a corner on which a vanished line is looked for on its side: 46 mm. From
// line.widthMm.
constexpr int32_t CORNER_MM_S_Q6_SAMPLES = 1472000L;
// Way out of a bend before a faster class is taken: 26.3 mm. From sensors.aheadOfAxleMm.
constexpr int32_t RELEASE_MM_S_Q6_SAMPLES = 840000L;
// Longest search for a lost line: 1.21 s; then the vehicle stops. From drive and
// line.tightestRadiusMm.
constexpr uint16_t SEARCH_SAMPLES = 603;

// Speed classes

struct SpeedClass {
  int16_t curvaturePerMQ8;  // largest curvature of the class
  int16_t speedSlope;       // speed gained for each step of curvature below that
  int32_t speedMmSQ6;       // speed at that curvature
  int16_t proportional;     // curvature for each step of offset, GAIN_BITS more bits
  int16_t derivative;       // the same for its change, FILTER_BITS fewer bits
  int16_t derivativeFilterQ15;
};

// From speeds.classes, the fastest first.
constexpr SpeedClass SPEED_CLASSES[] = {
    // straight: bends from 3600 mm radius at 1.26 m/s, limited by the finish target
    {71, 0, 80502L, 11650, 10710, 12893},
    // sweeping: bends from 960 mm radius at 1.26 m/s, limited by the finish target
    {267, 0, 80502L, 11633, 10838, 12893},
    // wide: bends from 480 mm radius at 1.26 m/s, limited by the finish target
    {533, 0, 80502L, 11579, 11020, 12893},
    // open: bends from 288 mm radius at 1.22 m/s, limited by the motors
    {889, 119, 77849L, 11450, 11126, 12893},
    // medium: bends from 180 mm radius at 1.1 m/s, limited by the motors
    {1422, 219, 70550L, 11121, 11166, 12893},
    // tight: bends from 120 mm radius at 0.908 m/s, limited by grip
    {2133, 280, 58087L, 11516, 11792, 12893},
    // reserve: bends from 90 mm radius at 0.786 m/s, limited by grip
    {2844, 175, 50305L, 11516, 12023, 12893},
};
constexpr uint8_t CLASS_COUNT = sizeof SPEED_CLASSES / sizeof SPEED_CLASSES[0];

// What must hold between them

template <typename T, uint32_t N>
constexpr uint32_t entriesOf(const T (&)[N]) {
  return N;
}
static_assert(entriesOf(GAP_MIDDLE_MM_Q6) == SENSOR_COUNT + 1, "one place for each gap of the bar");
static_assert(entriesOf(GAP_HALF_MM_Q6) == SENSOR_COUNT + 1, "one width for each gap of the bar");
static_assert(entriesOf(EDGE_TABLE_Q10) == EDGE_ENTRIES, "the edge table covers every sum");
static_assert((EDGE_ENTRIES - 1) << EDGE_STEP_BITS == 2 * FULL_COVERAGE_Q8,
              "up to two full coverages");
static_assert(entriesOf(GROUND_COUNTS) == SENSOR_COUNT, "one reading over ground for each sensor");
static_assert(entriesOf(COVERAGE_PER_COUNT_Q20) == SENSOR_COUNT, "one gain for each sensor");
static_assert(0 < LOW_COVERAGE_Q8 && LOW_COVERAGE_Q8 <= HIGH_COVERAGE_Q8, "thresholds in order");
static_assert(DEBOUNCE_SAMPLES > 0, "a button that has to be seen");

constexpr bool classesInOrder(uint8_t i) {
  return i == CLASS_COUNT ||
         (SPEED_CLASSES[i - 1].curvaturePerMQ8 <= SPEED_CLASSES[i].curvaturePerMQ8 &&
          classesInOrder(static_cast<uint8_t>(i + 1)));
}
static_assert(classesInOrder(1), "each class is for tighter bends than the one before");

// No sum and no product leaves 32 bits: the largest values that each can meet

constexpr bool fits(int64_t value) {
  return value <= INT32_MAX;
}
constexpr int64_t MOST_MM_S_Q6 = int64_t{WHEEL_LIMIT_MM_S} << SPEED_BITS;

constexpr bool coveragesFit(uint8_t i) {
  return i == SENSOR_COUNT ||
         (fits(int64_t{1023} * (COVERAGE_PER_COUNT_Q20[i] < 0 ? -COVERAGE_PER_COUNT_Q20[i]
                                                              : COVERAGE_PER_COUNT_Q20[i])) &&
          coveragesFit(static_cast<uint8_t>(i + 1)));
}
static_assert(coveragesFit(0), "reading times coverage per count");
constexpr bool edgesFit(uint8_t i) {
  return i > SENSOR_COUNT || (fits(int64_t{GAP_HALF_MM_Q6[i]} * EDGE_TABLE_Q10[EDGE_ENTRIES - 1]) &&
                              edgesFit(static_cast<uint8_t>(i + 1)));
}
static_assert(edgesFit(0), "half gap times edge table");
constexpr bool classFits(const SpeedClass& each) {
  return fits(int64_t{INT16_MAX} * (int64_t{each.proportional} + each.derivative)) &&
         fits(int64_t{each.curvaturePerMQ8} * each.speedSlope) &&
         fits((each.speedMmSQ6 + MOST_MM_S_Q6 +
               ((int64_t{each.curvaturePerMQ8} * each.speedSlope) >> SPEED_SLOPE_BITS))
              << SPEED_GAIN_BITS);
}
constexpr bool classesFit(uint8_t i) {
  return i == CLASS_COUNT ||
         (classFits(SPEED_CLASSES[i]) && classesFit(static_cast<uint8_t>(i + 1)));
}
static_assert(classesFit(0), "gains, speed slopes and speed errors");
static_assert(fits(int64_t{WHEEL_LIMIT_MM_S} * CURVATURE_LIMIT_PER_M_Q8), "speed times curvature");
static_assert(fits(int64_t{TURN_LIMIT_MRAD_S} * HALF_TRACK_M_Q16), "turn rate times half track");
static_assert(fits((2 * MOST_MM_S_Q6 >> SPEED_MODEL_BITS) * MOTOR_STEP_Q15), "motor model");
static_assert(fits(int64_t{WHEEL_LIMIT_MM_S} * DUTY_LEFT_PER_MM_S_Q24), "duty of the left wheel");
static_assert(fits(int64_t{WHEEL_LIMIT_MM_S} * DUTY_RIGHT_PER_MM_S_Q24), "duty of the right wheel");
static_assert(fits(GAP_MM_S_Q6_SAMPLES + MOST_MM_S_Q6), "way in a gap");
static_assert(fits(CROSSING_MM_S_Q6_SAMPLES + MOST_MM_S_Q6), "way on a crossing");
static_assert(fits(CORNER_MM_S_Q6_SAMPLES + MOST_MM_S_Q6), "way after a corner");
static_assert(fits(RELEASE_MM_S_Q6_SAMPLES + MOST_MM_S_Q6), "way out of a bend");
static_assert(fits(SEARCH_SAMPLES* MOST_MM_S_Q6), "way of a search");
