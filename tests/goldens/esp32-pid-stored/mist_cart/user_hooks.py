# Yours: code of your own for mist_cart. fairlead wrote this file once and leaves it alone.
#
# The firmware calls these functions. Keep them short and never wait in them: reading, steering
# and hooks share one sample period, and after 0.2 s the watchdog resets the board. Text, lists,
# fractions and large numbers take memory; in sample() that ends in a pause for collecting it, in
# the middle of a bend.


def setup():
    """Once, at the end of the start, motors off."""


def sample(steering):
    """At the end of every sample of a run; see class Steering for what there is to read."""


def stopped(reason):
    """When a run has ended, motors off; states.py has the reasons."""
