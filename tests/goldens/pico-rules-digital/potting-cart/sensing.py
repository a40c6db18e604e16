# Part of the firmware of potting-cart. Written by fairlead 0.1.0; change the build sheet, not
# this file.
#
# From readings to the line's offset at the bar. Each reading becomes a coverage, 0 to 256.
# Neighbouring sensors on the line form a run.
# An edge of the line lies half way between a covered and an uncovered sensor. Two edges give the
# middle of the line; where one lies outside the bar, the other and the line's width do.

from array import array

from constants import (
    CORNER_WIDTH_MM_Q6,
    FULL_COVERAGE_Q8,
    GAP_MIDDLE_MM_Q6,
    HALF_LINE_MM_Q6,
    LINE_LEVEL,
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
        self.first = 0  # the run of sensors taken for the line
        self.last = 0

    def find_line(self, counts):
        """Finds the line in one set of readings, leftmost sensor first: 0 or 1 each."""
        total = self._cover(counts)
        self.found = False
        self.reach = 0
        self.wide = total >= WIDE_COVERAGE_Q8
        if self.wide:
            return
        self._take_widest_run()

    def _cover(self, counts):
        """Turns readings into coverages; returns their sum."""
        coverage = self._coverage_q8
        total = 0
        for i in range(SENSOR_COUNT):
            value = FULL_COVERAGE_Q8 if counts[i] == LINE_LEVEL else 0
            coverage[i] = value
            total += value
        return total

    def _take_widest_run(self):
        """Of several runs the widest is the line; of equally wide ones, the span of all of them."""
        coverage = self._coverage_q8
        widest = 0
        i = 0
        while i < SENSOR_COUNT:
            if coverage[i] == 0:
                i += 1
                continue
            first = i
            while i < SENSOR_COUNT and coverage[i] != 0:
                i += 1
            width = i - first
            if width > widest:
                widest = width
                self.first = first
                self.last = i - 1
                self.found = True
            elif width == widest:
                self.last = i - 1
        if self.found:
            self.offset_mm_q6 = self._middle_of(self.first, self.last)
            self.reach = self._run_reach

    def _middle_of(self, first, last):
        """Middle of the line whose run of sensors is first to last."""
        self._run_reach = 0
        if first > 0:
            left_edge = GAP_MIDDLE_MM_Q6[first]
        if last < _LAST:
            right_edge = GAP_MIDDLE_MM_Q6[last + 1]
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
