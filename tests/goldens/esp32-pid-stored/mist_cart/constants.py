# Part of the firmware of mist_cart. Written by fairlead 0.1.0; change the build sheet, not this
# file.
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
FULL_COVERAGE_Q8 = const(256)
# Duty of a motor at full voltage.
FULL_DUTY_Q12 = const(4096)
# Bits of the coverage per count beyond coverage.
CALIBRATION_BITS = const(12)
# Bits of the edge table: 1024 is half the way between two sensors.
EDGE_BITS = const(10)
# Bits of coverage from one entry of the edge table to the next.
EDGE_STEP_BITS = const(5)
# Entries of the edge table.
EDGE_ENTRIES = const(17)
# Bits that a filtered value has beyond its input.
FILTER_BITS = const(4)
# Bits of the filter and motor model coefficients.
COEFFICIENT_BITS = const(15)
# Bits of a modelled speed beyond mm/s.
SPEED_BITS = const(6)
# Bits of a curvature beyond 1/m.
CURVATURE_BITS = const(8)
# Bits of a class's speed slope.
SPEED_SLOPE_BITS = const(4)
# How much faster than the motors a small speed error is closed: 2^n times.
SPEED_GAIN_BITS = const(2)
# Bits dropped from a speed difference before the motor model's product.
SPEED_MODEL_BITS = const(4)
# Bits of the half track width beyond m.
TRACK_BITS = const(16)
# Bits of the duty per wheel speed beyond duty.
SLOPE_BITS = const(12)

# Sensor bar

# Sensors of the bar. From sensors.count.
SENSOR_COUNT = const(6)
# Reading of each sensor over ground, counts. From sensors.calibration.ground.
GROUND_COUNTS = array("h", (490, 500, 510, 480, 495, 505))
# Share of a sensor on the line for each count above ground; negative where the line reads
# lower. From sensors.calibration.
COVERAGE_PER_COUNT_Q20 = array("h", (373, 368, 363, 369, 377, 367))
# Half way between neighbouring sensors, from the left, with one place beyond each end; mm left
# of the centre line. From sensors.pitchMm or positionsMm.
GAP_MIDDLE_MM_Q6 = array("h", (1920, 1280, 640, 0, -640, -1280, -1920))
# Half the way between neighbouring sensors, same places. From sensors.pitchMm or positionsMm.
GAP_HALF_MM_Q6 = array("h", (320, 320, 320, 320, 320, 320, 320))
# Where an edge of the line lies between two sensors, by the sum of their coverages; the spots
# are discs. From sensors.spotRadiusMm and pitchMm.
EDGE_TABLE_Q10 = array(
    "h",
    (
        -1843,
        -1544,
        -1355,
        -1186,
        -1024,
        -862,
        -693,
        -504,
        0,
        504,
        693,
        862,
        1024,
        1186,
        1355,
        1544,
        1843,
    ),
)
# Coverage from which a sensor counts as on the line: 50 %. From line.widthMm, sensors.pitchMm
# and spotRadiusMm.
HIGH_COVERAGE_Q8 = const(128)
# Coverage of an end sensor from which a line just outside the bar is still measured: 14.8 %.
LOW_COVERAGE_Q8 = const(38)
# Half the width of the line: 9.5 mm. From line.widthMm.
HALF_LINE_MM_Q6 = const(608)
# Width of line reaching an end of the bar from which it is taken for a corner: 34.34 mm. From
# line.widthMm and tightestRadiusMm.
CORNER_WIDTH_MM_Q6 = const(2198)
# Sum of coverages from which the bar lies on a crossing: 3.434 sensors. From line.widthMm and
# sensors.pitchMm.
WIDE_COVERAGE_Q8 = const(879)

# Steering

# Bits of the gains of the speed classes.
GAIN_BITS = const(13)
# Filter of the curvature demand that picks the speed class; time constant 6 ms.
DEMAND_FILTER_Q15 = const(18527)
# Filter of the curvature that is held over gaps and crossings; time constant 60 ms.
HOLD_FILTER_Q15 = const(2620)
# Largest curvature commanded: 33.3 per m. From drive.trackWidthMm.
CURVATURE_LIMIT_PER_M_Q8 = const(8533)
# Curvature of the search for a lost line: 16.7 per m. From drive.trackWidthMm and
# line.tightestRadiusMm.
SEARCH_CURVATURE_PER_M_Q8 = const(4267)

# Drive

# Half the track width: 60 mm. From drive.trackWidthMm.
HALF_TRACK_M_Q16 = const(3932)
# Largest turn rate commanded, mrad/s. From drive.motor and drive.trackWidthMm.
TURN_LIMIT_MRAD_S = const(27496)
# Wheel speed at full duty, mm/s. From drive.motor, drive.wheelDiameterMm and power.nominalV.
WHEEL_LIMIT_MM_S = const(1500)
# Wheel speed up to which a wheel is left without duty, mm/s.
WHEEL_DEAD_MM_S = const(15)
# Share of a speed difference that the motors make up in one sample; time constant 80 ms. From
# drive.motor.timeConstantMs.
MOTOR_STEP_Q15 = const(1985)
# Speed command above the present speed when speeding up: 0.395 m/s. From drive.gripCoefficient.
LEAD_UP_MM_S_Q6 = const(25306)
# Speed command below the present speed when braking: 0.417 m/s. From drive.gripCoefficient.
LEAD_DOWN_MM_S_Q6 = const(26712)
# Speed of the search for a lost line: 0.344 m/s. From drive.gripCoefficient.
SEARCH_SPEED_MM_S_Q6 = const(22043)
# Duty at which the left wheel begins to turn: 10 %. From drive.motor.startDutyPercent and trim.
START_DUTY_LEFT_Q12 = const(410)
# Duty at which the right wheel begins to turn: 10 %. From drive.motor.startDutyPercent and
# trim.
START_DUTY_RIGHT_Q12 = const(410)
# Duty of the left wheel for each mm/s beyond that. From drive.motor, drive.wheelDiameterMm and
# trim.
DUTY_LEFT_PER_MM_S_Q24 = const(10066)
# Duty of the right wheel for each mm/s beyond that. From drive.motor, drive.wheelDiameterMm and
# trim.
DUTY_RIGHT_PER_MM_S_Q24 = const(10066)

# Memory of the line

# Offset beyond which a vanished line has left by that side: 24.75 mm. From sensors and
# line.widthMm.
SIDE_OFFSET_MM_Q6 = const(1584)
# Way over which a vanished line is taken for a gap: 70 mm, as a sum of speeds over samples.
# From line.longestGapMm.
GAP_MM_S_Q6_SAMPLES = const(896000)
# Way over which a crossing may last: 65 mm. From line.widthMm.
CROSSING_MM_S_Q6_SAMPLES = const(832000)
# Way after a corner on which a vanished line is looked for on its side: 46 mm. From
# line.widthMm.
CORNER_MM_S_Q6_SAMPLES = const(588800)
# Way out of a bend before a faster class is taken: 26.3 mm. From sensors.aheadOfAxleMm.
RELEASE_MM_S_Q6_SAMPLES = const(336000)
# Longest search for a lost line: 1.21 s; then the vehicle stops. From drive and
# line.tightestRadiusMm.
SEARCH_SAMPLES = const(241)

# Speed classes


class SpeedClass:
    def __init__(
        self,
        curvature_per_m_q8,
        speed_mm_s_q6,
        speed_slope,
        proportional,
        derivative,
        derivative_filter_q15,
    ):
        # Largest curvature of the class, and the speed at that.
        self.curvature_per_m_q8 = curvature_per_m_q8
        self.speed_mm_s_q6 = speed_mm_s_q6
        # Speed gained for each step of curvature below that.
        self.speed_slope = speed_slope
        # Curvature for each step of offset, GAIN_BITS more bits.
        self.proportional = proportional
        # The same for its change, FILTER_BITS fewer bits.
        self.derivative = derivative
        self.derivative_filter_q15 = derivative_filter_q15


# From speeds.classes, the fastest first.
SPEED_CLASSES = (
    # Avenue: bends from 600 mm radius at 0.8 m/s, as speeds.classes says
    SpeedClass(
        curvature_per_m_q8=427,
        speed_mm_s_q6=51200,
        speed_slope=0,
        proportional=11605,
        derivative=4568,
        derivative_filter_q15=12893,
    ),
    # Bay turn: bends from 120 mm radius at 0.4 m/s, as speeds.classes says
    SpeedClass(
        curvature_per_m_q8=2133,
        speed_mm_s_q6=25600,
        speed_slope=0,
        proportional=11516,
        derivative=4958,
        derivative_filter_q15=12893,
    ),
)
LAST_CLASS = len(SPEED_CLASSES) - 1
