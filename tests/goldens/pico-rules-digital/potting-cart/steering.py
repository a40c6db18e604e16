# Part of the firmware of potting-cart. Written by fairlead 0.1.0; change the build sheet, not
# this file.
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
    COEFFICIENT_BITS,
    CORNER_MM_S_Q6_SAMPLES,
    CROSSING_MM_S_Q6_SAMPLES,
    CURVATURE_BITS,
    CURVATURE_LIMIT_PER_M_Q8,
    CURVATURE_PER_DIFFERENCE_Q4,
    DEMAND_FILTER_Q15,
    DUTY_LEFT_PER_MM_S_Q24,
    DUTY_RIGHT_PER_MM_S_Q24,
    FILTER_BITS,
    FRACTION_BITS,
    FULL_DUTY_Q12,
    GAIN_BITS,
    GAP_MM_S_Q6_SAMPLES,
    HALF_TRACK_M_Q16,
    HOLD_FILTER_Q15,
    LAST_CLASS,
    LEAD_DOWN_MM_S_Q6,
    LEAD_UP_MM_S_Q6,
    MOTOR_STEP_Q15,
    RELEASE_MM_S_Q6_SAMPLES,
    RULE_CURVATURE_BITS,
    SEARCH_CURVATURE_PER_M_Q8,
    SEARCH_SAMPLES,
    SEARCH_SPEED_MM_S_Q6,
    SIDE_OFFSET_MM_Q6,
    SLOPE_BITS,
    SPEED_BITS,
    SPEED_CLASSES,
    SPEED_GAIN_BITS,
    SPEED_MODEL_BITS,
    SPEED_SLOPE_BITS,
    START_DUTY_LEFT_Q12,
    START_DUTY_RIGHT_Q12,
    TRACK_BITS,
    TURN_LIMIT_MRAD_S,
    WHEEL_DEAD_MM_S,
    WHEEL_LIMIT_MM_S,
)
from rule_table import action_for
from sensing import Sensing

# Where in the course of following a line the vehicle is.
FOLLOW = const(0)
CROSSING = const(1)
GAP = const(2)
SEARCH = const(3)
STOPPED = const(4)  # the line is lost; until the next start

_INT16_MAX = const(32767)


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


def _filter_step(change, coefficient_q15):
    """What a first-order filter moves in one sample."""
    return (change * coefficient_q15) >> COEFFICIENT_BITS


def _duty_for(wheel_mm_s, start_duty_q12, duty_per_mm_s_q24):
    """Inverts the motor's dead zone and speed line."""
    size = -wheel_mm_s if wheel_mm_s < 0 else wheel_mm_s
    if size <= WHEEL_DEAD_MM_S:
        return 0
    duty = start_duty_q12 + ((size * duty_per_mm_s_q24) >> SLOPE_BITS)
    if duty > FULL_DUTY_Q12:
        duty = FULL_DUTY_Q12
    return -duty if wheel_mm_s < 0 else duty


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
        self.speed_mm_s_q6 = 0  # of the vehicle, modelled
        self.duty_left_q12 = 0  # -FULL_DUTY_Q12 to FULL_DUTY_Q12; positive drives forward
        self.duty_right_q12 = 0
        self._filtered = 0  # low-passed input, FILTER_BITS more bits
        self._demand = 0  # low-passed curvature, FILTER_BITS more bits
        self._held = 0  # curvature to hold while the line is not seen, FILTER_BITS more bits
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
            self.speed_mm_s_q6 = 0
            return
        if self.phase == FOLLOW:
            self._follow(before != FOLLOW)
        elif self.phase == SEARCH:
            self.curvature_per_m_q8 = self._side * SEARCH_CURVATURE_PER_M_Q8
        else:
            self.curvature_per_m_q8 = self._held >> FILTER_BITS
        self._follow_bend()
        self._drive()

    def _update_phase(self):
        sensing = self.sensing
        offset = sensing.offset_mm_q6
        if self._corner > 0:
            self._corner -= self.speed_mm_s_q6
        # A bar that stays on the line everywhere ends a search, and with it the run, like one
        # that sees none.
        if sensing.wide and self.phase != SEARCH:
            self._corner = 0
            self._enter(CROSSING)
            if self._travelled > CROSSING_MM_S_Q6_SAMPLES:
                self._enter(SEARCH)
        elif sensing.found:
            self._enter(FOLLOW)
            if offset != 0:
                self._side = 1 if offset > 0 else -1
            if sensing.reach != 0:
                self._corner = CORNER_MM_S_Q6_SAMPLES
                self._corner_side = sensing.reach
        elif self.phase == FOLLOW or self.phase == CROSSING:
            by_side = offset > SIDE_OFFSET_MM_Q6 or offset < -SIDE_OFFSET_MM_Q6
            if self._corner > 0:
                self._side = self._corner_side
            self._enter(SEARCH if by_side or self._corner > 0 else GAP)
        elif self.phase == GAP:
            if self._travelled > GAP_MM_S_Q6_SAMPLES:
                self._enter(SEARCH)
        elif self._searched >= SEARCH_SAMPLES:
            self._enter(STOPPED)
        # Only what a limit is set on is counted: a sum without end would outgrow the machine word.
        if self.phase == FOLLOW:
            self._travelled = 0
        else:
            self._travelled += self.speed_mm_s_q6
        if self.phase == SEARCH:
            self._searched += 1
        else:
            self._searched = 0

    def _enter(self, phase):
        if phase != self.phase:
            self.phase = phase
            self._travelled = 0

    def _input(self):
        """What is steered on: the curvature that the rule table asks for."""
        action = action_for(self.sensing.first, self.sensing.last)
        difference = action[1] - action[0]
        return (difference * CURVATURE_PER_DIFFERENCE_Q4) >> RULE_CURVATURE_BITS

    def _follow(self, regained):
        """Curvature from the rule table: proportional plus filtered derivative."""
        gains = SPEED_CLASSES[self.class_index]
        value = _clamped16(self._input())
        fine_value = value << FILTER_BITS
        if regained:
            self._filtered = fine_value
        change = _clamped16(fine_value - self._filtered)
        self._filtered += _filter_step(change, gains.derivative_filter_q15)
        total = value * gains.proportional + change * gains.derivative
        curvature = _clamped(total >> GAIN_BITS, CURVATURE_LIMIT_PER_M_Q8)
        self.curvature_per_m_q8 = curvature
        held_change = _clamped16((curvature << FILTER_BITS) - self._held)
        self._held += _filter_step(held_change, HOLD_FILTER_Q15)

    def _follow_bend(self):
        """Slower at once when more curvature is asked for, faster again by way out of the bend."""
        curvature = self.curvature_per_m_q8
        size = -curvature if curvature < 0 else curvature
        change = _clamped16((size << FILTER_BITS) - self._demand)
        self._demand += _filter_step(change, DEMAND_FILTER_Q15)
        asked = self._demand >> FILTER_BITS
        tightest = SPEED_CLASSES[LAST_CLASS].curvature_per_m_q8
        if asked > tightest:
            asked = tightest
        if asked >= self._bend:
            self._bend = asked
            self._release = RELEASE_MM_S_Q6_SAMPLES
        else:
            self._release -= self.speed_mm_s_q6
            if self._release <= 0:
                self._release = 0
                self._bend = asked
        index = 0
        while index < LAST_CLASS and self._bend > SPEED_CLASSES[index].curvature_per_m_q8:
            index += 1
        self.class_index = index

    def _target_speed_mm_s_q6(self):
        """Speed for the bend that the vehicle is in."""
        if self.phase == SEARCH:
            return SEARCH_SPEED_MM_S_Q6
        speeds = SPEED_CLASSES[self.class_index]
        below = speeds.curvature_per_m_q8 - self._bend
        return speeds.speed_mm_s_q6 + ((below * speeds.speed_slope) >> SPEED_SLOPE_BITS)

    def _drive(self):
        """From speed and curvature to duties; if one wheel saturates, the difference is kept."""
        speed = self.speed_mm_s_q6
        lead = (self._target_speed_mm_s_q6() - speed) << SPEED_GAIN_BITS
        if lead > LEAD_UP_MM_S_Q6:
            lead = LEAD_UP_MM_S_Q6
        if lead < -LEAD_DOWN_MM_S_Q6:
            lead = -LEAD_DOWN_MM_S_Q6
        base = (speed + lead) >> SPEED_BITS
        if self.phase == FOLLOW:
            action = action_for(self.sensing.first, self.sensing.last)
            base = (base * (action[0] + action[1])) >> (FRACTION_BITS + 1)

        wanted = ((speed >> SPEED_BITS) * self.curvature_per_m_q8) >> CURVATURE_BITS
        half = (_clamped(wanted, TURN_LIMIT_MRAD_S) * HALF_TRACK_M_Q16) >> TRACK_BITS
        left = base - half
        right = base + half
        beyond = (left if left > right else right) - WHEEL_LIMIT_MM_S
        if beyond > 0:
            left -= beyond
            right -= beyond
        left = _clamped(left, WHEEL_LIMIT_MM_S)
        right = _clamped(right, WHEEL_LIMIT_MM_S)

        middle = (left + right) << (SPEED_BITS - 1)
        lag = (middle - speed) >> SPEED_MODEL_BITS
        speed += (lag * MOTOR_STEP_Q15) >> (COEFFICIENT_BITS - SPEED_MODEL_BITS)
        self.speed_mm_s_q6 = 0 if speed < 0 else speed
        self.duty_left_q12 = _duty_for(left, START_DUTY_LEFT_Q12, DUTY_LEFT_PER_MM_S_Q24)
        self.duty_right_q12 = _duty_for(right, START_DUTY_RIGHT_Q12, DUTY_RIGHT_PER_MM_S_Q24)
