# Part of the firmware of potting-cart. Written by fairlead 0.1.0; change the build sheet, not
# this file.
#
# What the wheels do for each run of sensors on the line, from the first to the last of them.
# Between runs of several sensors the widest counts; sensing.py reduces every state of the bar to
# one run. Wheel speeds are fractions of the base speed, FRACTION_BITS bits. From control.kind.

from constants import SENSOR_COUNT

# Left and right wheel; runs in order of their first, then their last sensor.
RULE_TABLE = (
    (20, 108),  # sensor 1
    (31, 97),  # sensors 1 to 2
    (37, 91),  # sensors 1 to 3
    (52, 76),  # sensors 1 to 4
    (63, 65),  # sensors 1 to 5
    (74, 54),  # sensors 1 to 6
    (85, 43),  # sensors 1 to 7
    (64, 64),  # sensors 1 to 8
    (37, 91),  # sensor 2
    (42, 86),  # sensors 2 to 3
    (48, 80),  # sensors 2 to 4
    (53, 75),  # sensors 2 to 5
    (59, 69),  # sensors 2 to 6
    (64, 64),  # sensors 2 to 7
    (43, 85),  # sensors 2 to 8
    (48, 80),  # sensor 3
    (53, 75),  # sensors 3 to 4
    (59, 69),  # sensors 3 to 5
    (64, 64),  # sensors 3 to 6
    (69, 59),  # sensors 3 to 7
    (54, 74),  # sensors 3 to 8
    (59, 69),  # sensor 4
    (64, 64),  # sensors 4 to 5
    (69, 59),  # sensors 4 to 6
    (75, 53),  # sensors 4 to 7
    (65, 63),  # sensors 4 to 8
    (69, 59),  # sensor 5
    (75, 53),  # sensors 5 to 6
    (80, 48),  # sensors 5 to 7
    (76, 52),  # sensors 5 to 8
    (80, 48),  # sensor 6
    (86, 42),  # sensors 6 to 7
    (91, 37),  # sensors 6 to 8
    (91, 37),  # sensor 7
    (97, 31),  # sensors 7 to 8
    (108, 20),  # sensor 8
)


def action_for(first, last):
    before = first * SENSOR_COUNT - ((first * (first - 1)) >> 1)
    return RULE_TABLE[before + last - first]
