# Part of the firmware of mist_cart. Written by fairlead 0.1.0; change the build sheet, not this
# file.
#
# From readings to the line's offset at the bar. Each reading becomes a coverage, 0 to 255.
# Neighbouring sensors on the line form a run.
# An edge of the line lies between a covered and an uncovered sensor; the sum of their two
# coverages says where. Two edges give the middle of the line; where one lies outside the bar,
# the other and the line's width do.

from constants import (
    CALIBRATION_BITS,
    CORNER_WIDTH_MM_Q6,
    COVERAGE_255THS_PER_COUNT_Q12,
    EDGE_BITS,
    EDGE_STEP_BITS,
    EDGE_TABLE_Q12,
    FULL_COVERAGE_255THS,
    GAP_HALF_BITS,
    GAP_HALF_MM_Q9,
    GAP_MIDDLE_MM_Q6,
    GROUND_COUNTS,
    HALF_LINE_MM_Q6,
    HIGH_COVERAGE_255THS,
    LOW_COVERAGE_255THS,
    SENSOR_COUNT,
    WIDE_COVERAGE_255THS,
)

_LAST = SENSOR_COUNT - 1


class Sensing:
    def __init__(self):
        self._coverage = bytearray(SENSOR_COUNT)
        self._first = 0  # the run of sensors taken for the line
        self._last = 0
        self.reset()

    def reset(self):
        """Forgets the line."""
        self.found = False  # the line is under the bar
        self.wide = False  # the bar lies on a crossing
        # The line's middle, left of the bar's middle; the last one seen while not found.
        self.offset_mm_q6 = 0
        # End of the bar that a too wide line reaches, as at a corner: 1 left, -1 right.
        self.reach = 0

    def find_line(self, counts):
        """Finds the line in one set of readings, leftmost sensor first."""
        total = self._cover(counts)
        self.found = False
        self.reach = 0
        self.wide = total >= WIDE_COVERAGE_255THS
        if self.wide:
            return
        self._take_nearest_run()

    def _cover(self, counts):
        """Turns readings into coverages; returns their sum."""
        coverage = self._coverage
        total = 0
        for i in range(SENSOR_COUNT):
            above_ground = counts[i] - GROUND_COUNTS[i]
            value = (above_ground * COVERAGE_255THS_PER_COUNT_Q12[i]) >> CALIBRATION_BITS
            if value < 0:
                value = 0
            elif value > FULL_COVERAGE_255THS:
                value = FULL_COVERAGE_255THS
            coverage[i] = value
            total += value
        return total

    def _take_nearest_run(self):
        """Of several runs, the one nearest to the last offset is the line."""
        coverage = self._coverage
        nearest = 0
        i = 0
        while i < SENSOR_COUNT:
            if coverage[i] < HIGH_COVERAGE_255THS:
                i += 1
                continue
            first = i
            while i < SENSOR_COUNT and coverage[i] >= HIGH_COVERAGE_255THS:
                i += 1
            distance = self._distance_of(first, i - 1)
            if not self.found or distance < nearest:
                self.found = True
                nearest = distance
                self._first = first
                self._last = i - 1
        if self.found:
            self._measure(self._first, self._last)
        else:
            self._find_beyond_ends()

    def _distance_of(self, first, last):
        """How far a run lies from the last offset, by the middles of its gaps."""
        left_edge = GAP_MIDDLE_MM_Q6[first]
        right_edge = GAP_MIDDLE_MM_Q6[last + 1]
        if first == 0:
            middle = right_edge + HALF_LINE_MM_Q6
        elif last == _LAST:
            middle = left_edge - HALF_LINE_MM_Q6
        else:
            middle = (left_edge + right_edge) >> 1
        before = self.offset_mm_q6
        return middle - before if middle > before else before - middle

    def _measure(self, first, last):
        """Takes the run of sensors first to last for the line."""
        if first > 0:
            shift = _edge_shift_mm_q6(GAP_HALF_MM_Q9[first], self._sum_of(first - 1))
            left_edge = GAP_MIDDLE_MM_Q6[first] + shift
        if last < _LAST:
            shift = _edge_shift_mm_q6(GAP_HALF_MM_Q9[last + 1], self._sum_of(last))
            right_edge = GAP_MIDDLE_MM_Q6[last + 1] - shift
        if first > 0 and last < _LAST:
            self.offset_mm_q6 = (left_edge + right_edge) >> 1
        elif first > 0:
            if left_edge - GAP_MIDDLE_MM_Q6[SENSOR_COUNT] > CORNER_WIDTH_MM_Q6:
                self.reach = -1
            self.offset_mm_q6 = left_edge - HALF_LINE_MM_Q6
        elif last < _LAST:
            if GAP_MIDDLE_MM_Q6[0] - right_edge > CORNER_WIDTH_MM_Q6:
                self.reach = 1
            self.offset_mm_q6 = right_edge + HALF_LINE_MM_Q6
        else:
            self.offset_mm_q6 = 0

    def _sum_of(self, left):
        return self._coverage[left] + self._coverage[left + 1]

    def _find_beyond_ends(self):
        """No sensor is on the line; one just beyond an end may partly cover the end sensor."""
        left = self._coverage[0]
        right = self._coverage[_LAST]
        if left >= LOW_COVERAGE_255THS and left >= right:
            self.found = True
            shift = _edge_shift_mm_q6(GAP_HALF_MM_Q9[0], FULL_COVERAGE_255THS + left)
            self.offset_mm_q6 = GAP_MIDDLE_MM_Q6[0] - shift + HALF_LINE_MM_Q6
        elif right >= LOW_COVERAGE_255THS:
            self.found = True
            shift = _edge_shift_mm_q6(GAP_HALF_MM_Q9[SENSOR_COUNT], FULL_COVERAGE_255THS + right)
            self.offset_mm_q6 = GAP_MIDDLE_MM_Q6[SENSOR_COUNT] + shift - HALF_LINE_MM_Q6


def _edge_shift_mm_q6(half_gap_mm_q9, sum_255ths):
    """Place of an edge beside the middle of its gap, by the sum of the coverages on both sides."""
    place = (
        sum_255ths + 1
    )  # so that an entry stands for just one full coverage: an edge in the middle
    index = place >> EDGE_STEP_BITS
    part = place & ((1 << EDGE_STEP_BITS) - 1)
    value = EDGE_TABLE_Q12[index]
    value += ((EDGE_TABLE_Q12[index + 1] - value) * part) >> EDGE_STEP_BITS
    return (half_gap_mm_q9 * value) >> (EDGE_BITS + GAP_HALF_BITS)
