# Part of the firmware of mist_cart. Written by fairlead 0.1.0; change the build sheet, not this
# file.
#
# Readings -> offset -> phase -> curvature -> speed class -> wheel speeds -> duties, one step a
# sample period. The command is a curvature, a turn for each metre driven, so that one tuning
# serves neighbouring speeds. The vehicle's speed is not measured: a first-order model of the
# motors, driven by the very command that the wheels get, stands in for it.
#
# Integers only, of at most 31 bits, and nothing else that would take memory: in a run the
# garbage collector has nothing to do.

from micropython import const

from constants import (
    CLASS_SPEED_BITS,
    COEFFICIENT_BITS,
    CORNER_SPEED_Q13_SAMPLES,
    CROSSING_SPEED_Q13_SAMPLES,
    CURVATURE_BITS,
    CURVATURE_LIMIT_PER_M_Q8,
    DEMAND_FILTER_Q15,
    DUTY_LEFT_PER_SPEED_Q14,
    DUTY_RIGHT_PER_SPEED_Q14,
    FILTER_BITS,
    FULL_DUTY_Q12,
    FULL_SPEED_Q13,
    GAIN_BITS,
    GAP_SPEED_Q13_SAMPLES,
    HALF_TRACK_M_Q14,
    HOLD_FILTER_Q15,
    LAST_CLASS,
    LEAD_DOWN_SPEED_Q13,
    LEAD_UP_SPEED_Q13,
    MOTOR_STEP_Q15,
    RELEASE_SPEED_Q13_SAMPLES,
    SEARCH_CURVATURE_PER_M_Q8,
    SEARCH_SAMPLES,
    SEARCH_SPEED_Q15,
    SIDE_OFFSET_MM_Q6,
    SLOPE_BITS,
    SPEED_BITS,
    SPEED_CLASSES,
    SPEED_MODEL_BITS,
    SPEED_SLOPE_BITS,
    START_DUTY_LEFT_Q12,
    START_DUTY_RIGHT_Q12,
    TRACK_BITS,
    WHEEL_DEAD_SPEED_Q13,
)
from sensing import Sensing

# Where in the course of following a line the vehicle is.
FOLLOW = const(0)
CROSSING = const(1)
GAP = const(2)
SEARCH = const(3)
STOPPED = const(4)  # the line is lost; until the next start

_INT16_MAX = const(32767)
_MODEL_BITS = SPEED_MODEL_BITS - SPEED_BITS
_TARGET_BITS = SPEED_MODEL_BITS - CLASS_SPEED_BITS


def _clamped(value, limit):
    if value > limit:
        return limit
    if value < -limit:
        return -limit
    return value


def _clamped16(value):
    if value > _INT16_MAX:
        return _INT16_MAX
    if value < -_INT16_MAX:
        return -_INT16_MAX
    return value


def _duty_for(wheel_q13, start_duty_q12, duty_per_speed_q14):
    """Inverts the motor's dead zone and speed line."""
    size = -wheel_q13 if wheel_q13 < 0 else wheel_q13
    if size <= WHEEL_DEAD_SPEED_Q13:
        return 0
    duty = start_duty_q12 + ((size * duty_per_speed_q14) >> SLOPE_BITS)
    if duty > FULL_DUTY_Q12:
        duty = FULL_DUTY_Q12
    return -duty if wheel_q13 < 0 else duty


class Steering:
    def __init__(self):
        self.sensing = Sensing()
        self.start()

    def start(self):
        """Puts the controller into the state at the start of a run."""
        self.sensing.reset()
        self.phase = FOLLOW
        self.class_index = 0  # speed class in force
        self.curvature_per_m_q8 = 0  # commanded
        self.speed_q29 = 0  # of the vehicle, modelled: share of the speed at full duty
        self.duty_left_q12 = 0  # -FULL_DUTY_Q12 to FULL_DUTY_Q12; positive drives forward
        self.duty_right_q12 = 0
        self._filtered = 0  # low-passed input, FILTER_BITS more bits
        self._demand = 0  # low-passed curvature, COEFFICIENT_BITS more bits
        self._held = 0  # curvature to hold while the line is not seen, COEFFICIENT_BITS more bits
        self._travelled = 0  # way in this phase; 0 while the line is followed
        self._searched = 0  # samples of the search
        self._side = 1  # side on which the line was last seen: 1 left, -1 right
        self._bend = 0  # curvature of the bend that the vehicle is in
        self._release = 0  # way to go until the bend is over
        self._corner = 0  # way to go in which a vanished line is taken for a corner
        self._corner_side = 1

    def step(self, counts):
        """One sample period: readings, leftmost sensor first, to duties."""
        if self.phase == STOPPED:
            return
        self.sensing.find_line(counts)
        before = self.phase
        self._update_phase()
        if self.phase == STOPPED:
            self.duty_left_q12 = 0
            self.duty_right_q12 = 0
            self.speed_q29 = 0
            return
        if self.phase == FOLLOW:
            self._follow(before != FOLLOW)
        elif self.phase == SEARCH:
            self.curvature_per_m_q8 = self._side * SEARCH_CURVATURE_PER_M_Q8
        else:
            self.curvature_per_m_q8 = self._held >> COEFFICIENT_BITS
        self._follow_bend()
        self._drive()

    def _update_phase(self):
        sensing = self.sensing
        offset = sensing.offset_mm_q6
        speed = self.speed_q29 >> _MODEL_BITS
        if self._corner > 0:
            self._corner -= speed
        # A bar that stays on the line everywhere ends a search, and with it the run, like one
        # that sees none.
        if sensing.wide and self.phase != SEARCH:
            self._corner = 0
            self._enter(CROSSING)
            if self._travelled > CROSSING_SPEED_Q13_SAMPLES:
                self._enter(SEARCH)
        elif sensing.found:
            self._enter(FOLLOW)
            if offset != 0:
                self._side = 1 if offset > 0 else -1
            if sensing.reach != 0:
                self._corner = CORNER_SPEED_Q13_SAMPLES
                self._corner_side = sensing.reach
        elif self.phase == FOLLOW or self.phase == CROSSING:
            by_side = offset > SIDE_OFFSET_MM_Q6 or offset < -SIDE_OFFSET_MM_Q6
            if self._corner > 0:
                self._side = self._corner_side
            self._enter(SEARCH if by_side or self._corner > 0 else GAP)
        elif self.phase == GAP:
            if self._travelled > GAP_SPEED_Q13_SAMPLES:
                self._enter(SEARCH)
        elif self._searched >= SEARCH_SAMPLES:
            self._enter(STOPPED)
        # Only what a limit is set on is counted: a sum without end would outgrow the machine word.
        if self.phase == FOLLOW:
            self._travelled = 0
        else:
            self._travelled += speed
        if self.phase == SEARCH:
            self._searched += 1
        else:
            self._searched = 0

    def _enter(self, phase):
        if phase != self.phase:
            self.phase = phase
            self._travelled = 0

    def _follow(self, regained):
        """Curvature from the offset: proportional plus filtered derivative."""
        gains = SPEED_CLASSES[self.class_index]
        value = self.sensing.offset_mm_q6
        fine_value = value << FILTER_BITS
        if regained:
            self._filtered = fine_value
        change = _clamped16(fine_value - self._filtered)
        self._filtered += (change * gains.derivative_filter_q15) >> COEFFICIENT_BITS
        total = value * gains.proportional + change * gains.derivative
        curvature = _clamped(total >> GAIN_BITS, CURVATURE_LIMIT_PER_M_Q8)
        self.curvature_per_m_q8 = curvature
        self._held += (curvature - (self._held >> COEFFICIENT_BITS)) * HOLD_FILTER_Q15

    def _follow_bend(self):
        """Slower at once when more curvature is asked for, faster again by way out of the bend."""
        curvature = self.curvature_per_m_q8
        size = -curvature if curvature < 0 else curvature
        self._demand += (size - (self._demand >> COEFFICIENT_BITS)) * DEMAND_FILTER_Q15
        asked = self._demand >> COEFFICIENT_BITS
        tightest = SPEED_CLASSES[LAST_CLASS].curvature_per_m_q8
        if asked > tightest:
            asked = tightest
        if asked >= self._bend:
            self._bend = asked
            self._release = RELEASE_SPEED_Q13_SAMPLES
        else:
            self._release -= self.speed_q29 >> _MODEL_BITS
            if self._release <= 0:
                self._release = 0
                self._bend = asked
        index = self.class_index
        while index > 0 and self._bend <= SPEED_CLASSES[index - 1].curvature_per_m_q8:
            index -= 1
        while index < LAST_CLASS and self._bend > SPEED_CLASSES[index].curvature_per_m_q8:
            index += 1
        self.class_index = index

    def _target_speed_q15(self):
        """Speed for the bend that the vehicle is in."""
        if self.phase == SEARCH:
            return SEARCH_SPEED_Q15
        speeds = SPEED_CLASSES[self.class_index]
        below = speeds.curvature_per_m_q8 - self._bend
        return speeds.speed_q15 + ((below * speeds.speed_slope) >> SPEED_SLOPE_BITS)

    def _drive(self):
        """From speed and curvature to duties; if one wheel saturates, the difference is kept."""
        speed = self.speed_q29 >> _MODEL_BITS
        # A difference of speeds with two more bits is four times as large: the gain.
        lead = self._target_speed_q15() - (self.speed_q29 >> _TARGET_BITS)
        if lead > LEAD_UP_SPEED_Q13:
            lead = LEAD_UP_SPEED_Q13
        if lead < -LEAD_DOWN_SPEED_Q13:
            lead = -LEAD_DOWN_SPEED_Q13
        base = speed + lead

        per_speed = (self.curvature_per_m_q8 * HALF_TRACK_M_Q14) >> CURVATURE_BITS
        half = (speed * per_speed) >> TRACK_BITS
        left = base - half
        right = base + half
        beyond = (left if left > right else right) - FULL_SPEED_Q13
        if beyond > 0:
            left -= beyond
            right -= beyond
        left = _clamped(left, FULL_SPEED_Q13)
        right = _clamped(right, FULL_SPEED_Q13)

        # Twice the difference with 13 bits, times a coefficient with 15: 29 bits.
        changed = self.speed_q29 + (left + right - 2 * speed) * MOTOR_STEP_Q15
        self.speed_q29 = 0 if changed < 0 else changed
        self.duty_left_q12 = _duty_for(left, START_DUTY_LEFT_Q12, DUTY_LEFT_PER_SPEED_Q14)
        self.duty_right_q12 = _duty_for(right, START_DUTY_RIGHT_Q12, DUTY_RIGHT_PER_SPEED_Q14)
