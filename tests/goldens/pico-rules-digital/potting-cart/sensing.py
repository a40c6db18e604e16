# Part of the firmware of potting-cart. Written by fairlead 0.1.0; change the build sheet, not
# this file.
#
# From readings to the line's offset at the bar. Each reading becomes a coverage, 0 to 255.
# Neighbouring sensors on the line form a run.
# An edge of the line lies half way between a covered and an uncovered sensor. Two edges give the
# middle of the line; where one lies outside the bar, the other and the line's width do.

from constants import (
    CORNER_WIDTH_MM_Q6,
    FULL_COVERAGE_255THS,
    GAP_MIDDLE_MM_Q6,
    HALF_LINE_MM_Q6,
    LINE_LEVEL,
    SENSOR_COUNT,
    WIDE_COVERAGE_255THS,
)

_LAST = SENSOR_COUNT - 1


class Sensing:
    def __init__(self):
        self._coverage = bytearray(SENSOR_COUNT)
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
        self.wide = total >= WIDE_COVERAGE_255THS
        if self.wide:
            return
        self._take_widest_run()

    def _cover(self, counts):
        """Turns readings into coverages; returns their sum."""
        coverage = self._coverage
        total = 0
        for i in range(SENSOR_COUNT):
            value = FULL_COVERAGE_255THS if counts[i] == LINE_LEVEL else 0
            coverage[i] = value
            total += value
        return total

    def _take_widest_run(self):
        """Of several runs the widest is the line; of equally wide ones, the span of all of them."""
        coverage = self._coverage
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
            self._measure(self.first, self.last)

    def _measure(self, first, last):
        """Takes the run of sensors first to last for the line."""
        if first > 0:
            left_edge = GAP_MIDDLE_MM_Q6[first]
        if last < _LAST:
            right_edge = GAP_MIDDLE_MM_Q6[last + 1]
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
