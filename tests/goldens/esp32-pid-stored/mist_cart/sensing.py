# Part of the firmware of mist_cart. Written by fairlead 0.1.0; change the build sheet, not this
# file.
#
# From readings to the line's offset at the bar. Each reading becomes a coverage, 0 to 256.
# Neighbouring sensors on the line form a run.
# An edge of the line lies between a covered and an uncovered sensor; the sum of their two
# coverages says where. Two edges give the middle of the line; where one lies outside the bar,
# the other and the line's width do.

from array import array

from constants import (
    CALIBRATION_BITS,
    CORNER_WIDTH_MM_Q6,
    COVERAGE_PER_COUNT_Q20,
    EDGE_BITS,
    EDGE_ENTRIES,
    EDGE_STEP_BITS,
    EDGE_TABLE_Q10,
    FULL_COVERAGE_Q8,
    GAP_HALF_MM_Q6,
    GAP_MIDDLE_MM_Q6,
    GROUND_COUNTS,
    HALF_LINE_MM_Q6,
    HIGH_COVERAGE_Q8,
    LOW_COVERAGE_Q8,
    SENSOR_COUNT,
    WIDE_COVERAGE_Q8,
)

_LAST = SENSOR_COUNT - 1


class Sensing:
    def __init__(self):
        self._coverage_q8 = array("h", bytes(2 * SENSOR_COUNT))
        self._run_reach = 0  # what _middle_of() saw of reach
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
        self.wide = total >= WIDE_COVERAGE_Q8
        if self.wide:
            return
        self._take_nearest_run()

    def _cover(self, counts):
        """Turns readings into coverages; returns their sum."""
        coverage = self._coverage_q8
        total = 0
        for i in range(SENSOR_COUNT):
            above_ground = counts[i] - GROUND_COUNTS[i]
            value = (above_ground * COVERAGE_PER_COUNT_Q20[i]) >> CALIBRATION_BITS
            if value < 0:
                value = 0
            elif value > FULL_COVERAGE_Q8:
                value = FULL_COVERAGE_Q8
            coverage[i] = value
            total += value
        return total

    def _take_nearest_run(self):
        """Of several runs, the one nearest to the last offset is the line."""
        coverage = self._coverage_q8
        before = self.offset_mm_q6
        nearest = 0
        i = 0
        while i < SENSOR_COUNT:
            if coverage[i] < HIGH_COVERAGE_Q8:
                i += 1
                continue
            first = i
            while i < SENSOR_COUNT and coverage[i] >= HIGH_COVERAGE_Q8:
                i += 1
            offset = self._middle_of(first, i - 1)
            distance = offset - before if offset > before else before - offset
            if not self.found or distance < nearest:
                self.found = True
                nearest = distance
                self.offset_mm_q6 = offset
                self.reach = self._run_reach
        if not self.found:
            self._find_beyond_ends()

    def _middle_of(self, first, last):
        """Middle of the line whose run of sensors is first to last."""
        self._run_reach = 0
        if first > 0:
            shift = _edge_shift_mm_q6(GAP_HALF_MM_Q6[first], self._sum_of(first - 1))
            left_edge = GAP_MIDDLE_MM_Q6[first] + shift
        if last < _LAST:
            shift = _edge_shift_mm_q6(GAP_HALF_MM_Q6[last + 1], self._sum_of(last))
            right_edge = GAP_MIDDLE_MM_Q6[last + 1] - shift
        if first > 0 and last < _LAST:
            return (left_edge + right_edge) >> 1
        if first > 0:
            if left_edge - GAP_MIDDLE_MM_Q6[SENSOR_COUNT] > CORNER_WIDTH_MM_Q6:
                self._run_reach = -1
            return left_edge - HALF_LINE_MM_Q6
        if last < _LAST:
            if GAP_MIDDLE_MM_Q6[0] - right_edge > CORNER_WIDTH_MM_Q6:
                self._run_reach = 1
            return right_edge + HALF_LINE_MM_Q6
        return 0

    def _sum_of(self, left):
        return self._coverage_q8[left] + self._coverage_q8[left + 1]

    def _find_beyond_ends(self):
        """No sensor is on the line; one just beyond an end may partly cover the end sensor."""
        left = self._coverage_q8[0]
        right = self._coverage_q8[_LAST]
        if left >= LOW_COVERAGE_Q8 and left >= right:
            self.found = True
            shift = _edge_shift_mm_q6(GAP_HALF_MM_Q6[0], FULL_COVERAGE_Q8 + left)
            self.offset_mm_q6 = GAP_MIDDLE_MM_Q6[0] - shift + HALF_LINE_MM_Q6
        elif right >= LOW_COVERAGE_Q8:
            self.found = True
            shift = _edge_shift_mm_q6(GAP_HALF_MM_Q6[SENSOR_COUNT], FULL_COVERAGE_Q8 + right)
            self.offset_mm_q6 = GAP_MIDDLE_MM_Q6[SENSOR_COUNT] + shift - HALF_LINE_MM_Q6


def _edge_shift_mm_q6(half_gap_mm_q6, sum_q8):
    """Place of an edge beside the middle of its gap, by the sum of the coverages on both sides."""
    index = sum_q8 >> EDGE_STEP_BITS
    value = EDGE_TABLE_Q10[index]
    if index < EDGE_ENTRIES - 1:
        part = sum_q8 & ((1 << EDGE_STEP_BITS) - 1)
        value += ((EDGE_TABLE_Q10[index + 1] - value) * part) >> EDGE_STEP_BITS
    return (half_gap_mm_q6 * value) >> EDGE_BITS
