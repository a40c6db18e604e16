# Part of the firmware of mist_cart. Written by fairlead 0.1.0; change the build sheet, not this
# file.
#
# What the vehicle is doing, and why it stands still.

from micropython import const

# States. READY, LINE_LOST, STOPPED and FAULT wait for the button, motors off.
READY = const(0)
COUNTDOWN = const(1)
RUNNING = const(3)
LINE_LOST = const(4)
STOPPED = const(5)
FAULT = const(6)

# Reasons: the number of flashes that show each.
# ready
REASON_READY = const(1)
# stopped by the button
REASON_BUTTON = const(2)
# the line was lost and the search did not find it
REASON_LINE_LOST = const(3)
# the run limit was reached
REASON_RUN_LIMIT = const(4)
# the control loop missed its period too often
REASON_OVERRUN = const(5)
# restarted by the watchdog after the program hung
REASON_WATCHDOG = const(6)


def is_moving(state):
    return state == RUNNING
