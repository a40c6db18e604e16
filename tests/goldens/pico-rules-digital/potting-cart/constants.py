# Part of the firmware of potting-cart. Written by fairlead 0.1.0; change the build sheet, not
# this file.
#
# The numbers of this vehicle. A name that ends in _Qn holds its quantity times 2^n:
# 608 in HALF_LINE_MM_Q6 is 9.5 mm. Offsets to the left and turns to the left are positive.

from array import array

from micropython import const

# Time

# Period of the control loop, us: 200 samples a second. From target.board.
SAMPLE_PERIOD_US = const(5000)
# From the button to the first motion: 0.5 s. From start.countdownS.
COUNTDOWN_SAMPLES = const(100)
# Longest run: 120 s. From start.runLimitS.
RUN_LIMIT_SAMPLES = const(24000)
# How long the button must keep its level to count: 20 ms. Common practice.
DEBOUNCE_SAMPLES = const(4)
# Samples of one run that may begin a whole period late before the run is stopped. Common
# practice.
OVERRUN_LIMIT = const(20)
# Length of one flash and of one pause of the LED: 0.2 s. Common practice.
BLINK_SAMPLES = const(40)

# Scales of the integers

# Coverage of a sensor whose spot lies wholly on the line.
FULL_COVERAGE_255THS = const(255)
# Duty of a motor at full voltage.
FULL_DUTY_Q12 = const(4096)
# Bits that a filtered value has beyond its input.
FILTER_BITS = const(4)
# Bits of the filter and motor model coefficients.
COEFFICIENT_BITS = const(15)
# Bits of the curvature per wheel-speed difference.
RULE_CURVATURE_BITS = const(8)
# Bits of the rule table's wheel-speed fractions.
FRACTION_BITS = const(6)
# Bits of a curvature beyond 1/m.
CURVATURE_BITS = const(8)
# Bits of a speed: 8192 is the speed at full duty.
SPEED_BITS = const(13)
# Bits of a class's speed; the two more make the firmware close a speed error 4 times as fast as
# the motors.
CLASS_SPEED_BITS = const(15)
# Bits of the modelled speed.
SPEED_MODEL_BITS = const(29)
# Bits of a class's speed slope.
SPEED_SLOPE_BITS = const(8)
# Bits of the half track width beyond m, and of a turn for each speed.
TRACK_BITS = const(14)
# Bits of the duty for each speed, in units of both.
SLOPE_BITS = const(15)

# Sensor bar

# Sensors of the bar. From sensors.count.
SENSOR_COUNT = const(8)
# Level of a sensor's pin over the line: low. From sensors.lineLevel.
LINE_LEVEL = const(0)
# Half way between neighbouring sensors, from the left, with one place beyond each end; mm left
# of the centre line. From sensors.pitchMm or positionsMm.
GAP_MIDDLE_MM_Q6 = array("h", (2304, 1728, 1152, 576, 0, -576, -1152, -1728, -2304))
# Half the width of the line: 9.5 mm. From line.widthMm.
HALF_LINE_MM_Q6 = const(608)
# Width of line reaching an end of the bar from which it is taken for a corner: 33.34 mm. From
# line.widthMm and tightestRadiusMm.
CORNER_WIDTH_MM_Q6 = const(2134)
# Sum of coverages from which the bar lies on a crossing: 3.706 sensors. From line.widthMm and
# sensors.pitchMm.
WIDE_COVERAGE_255THS = const(945)

# Steering

# Bits of the gains of the speed classes.
GAIN_BITS = const(14)
# Filter of the curvature demand that picks the speed class; time constant 25 ms.
DEMAND_FILTER_Q15 = const(5940)
# Filter of the curvature that is held over gaps and crossings; time constant 60 ms.
HOLD_FILTER_Q15 = const(2620)
# Largest curvature commanded: 33.3 per m. From drive.trackWidthMm.
CURVATURE_LIMIT_PER_M_Q8 = const(8533)
# Curvature of the search for a lost line: 16.7 per m. From drive.trackWidthMm and
# line.tightestRadiusMm.
SEARCH_CURVATURE_PER_M_Q8 = const(4267)
# Curvature for each step of difference between the wheels' fractions. From drive.trackWidthMm.
CURVATURE_PER_DIFFERENCE_Q8 = const(8533)

# Drive

# Half the track width: 60 mm. From drive.trackWidthMm.
HALF_TRACK_M_Q14 = const(983)
# Wheel speed at full duty, of which all speeds are shares: 1.5 m/s. From drive.motor,
# drive.wheelDiameterMm and power.nominalV.
FULL_SPEED_Q13 = const(8191)
# Wheel speed up to which a wheel is left without duty: 0.015 m/s.
WHEEL_DEAD_SPEED_Q13 = const(82)
# Share of a speed difference that the motors make up in one sample; time constant 80 ms. From
# drive.motor.timeConstantMs.
MOTOR_STEP_Q15 = const(1985)
# Speed command above the present speed when speeding up: 0.395 m/s. From drive.gripCoefficient.
LEAD_UP_SPEED_Q13 = const(2160)
# Speed command below the present speed when braking: 0.417 m/s. From drive.gripCoefficient.
LEAD_DOWN_SPEED_Q13 = const(2280)
# Speed of the search for a lost line: 0.344 m/s. From drive.gripCoefficient.
SEARCH_SPEED_Q15 = const(7525)
# Duty at which the left wheel begins to turn: 10 %. From drive.motor.startDutyPercent and trim.
START_DUTY_LEFT_Q12 = const(410)
# Duty at which the right wheel begins to turn: 10 %. From drive.motor.startDutyPercent and
# trim.
START_DUTY_RIGHT_Q12 = const(410)
# Duty of the left wheel for each speed beyond that, both as shares. From drive.motor and trim.
DUTY_LEFT_PER_SPEED_Q14 = const(14746)
# Duty of the right wheel for each speed beyond that, both as shares. From drive.motor and trim.
DUTY_RIGHT_PER_SPEED_Q14 = const(14746)

# Memory of the line

# Offset beyond which a vanished line has left by that side: 31.75 mm. From sensors and
# line.widthMm.
SIDE_OFFSET_MM_Q6 = const(2032)
# Way over which a vanished line is taken for a gap: 70 mm, as a sum of speeds over samples.
# From line.longestGapMm.
GAP_SPEED_Q13_SAMPLES = const(76469)
# Way over which a crossing may last: 65 mm. From line.widthMm.
CROSSING_SPEED_Q13_SAMPLES = const(71007)
# Way after a corner on which a vanished line is looked for on its side: 46 mm. From
# line.widthMm.
CORNER_SPEED_Q13_SAMPLES = const(50251)
# Way out of a bend before a faster class is taken: 26.3 mm. From sensors.aheadOfAxleMm.
RELEASE_SPEED_Q13_SAMPLES = const(28676)
# Longest search for a lost line: 1.21 s; then the vehicle stops. From drive and
# line.tightestRadiusMm.
SEARCH_SAMPLES = const(241)

# Speed classes


class SpeedClass:
    def __init__(
        self,
        curvature_per_m_q8,
        speed_q15,
        speed_slope,
        proportional,
        derivative,
        derivative_filter_q15,
    ):
        # Largest curvature of the class, and the speed at that.
        self.curvature_per_m_q8 = curvature_per_m_q8
        self.speed_q15 = speed_q15
        # Speed gained for each step of curvature below that, SPEED_SLOPE_BITS more bits.
        self.speed_slope = speed_slope
        # Curvature for each step of the table's curvature, GAIN_BITS more bits.
        self.proportional = proportional
        # The same for its change, FILTER_BITS fewer bits.
        self.derivative = derivative
        self.derivative_filter_q15 = derivative_filter_q15


# From speeds.classes, the fastest first.
SPEED_CLASSES = (
    # Avenue: bends from 600 mm radius at 0.8 m/s, as speeds.classes says
    SpeedClass(
        curvature_per_m_q8=427,
        speed_q15=17479,
        speed_slope=0,
        proportional=18330,
        derivative=7215,
        derivative_filter_q15=12893,
    ),
    # Bay turn: bends from 120 mm radius at 0.4 m/s, as speeds.classes says
    SpeedClass(
        curvature_per_m_q8=2133,
        speed_q15=8739,
        speed_slope=0,
        proportional=16384,
        derivative=7478,
        derivative_filter_q15=12893,
    ),
)
LAST_CLASS = len(SPEED_CLASSES) - 1
