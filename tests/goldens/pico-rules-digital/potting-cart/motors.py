# Part of the firmware of potting-cart. Written by fairlead 0.1.0; change the build sheet, not
# this file.
#
# The input of the wanted side is held high; the other carries the inverted PWM, so that the motor
# is driven while it is low and braked while it is high (slow decay), which keeps slow driving even.
# Importing this module switches the motors off.

from machine import PWM, Pin
from micropython import const

from pins import (
    LEFT_FORWARD_PIN,
    LEFT_BACKWARD_PIN,
    RIGHT_FORWARD_PIN,
    RIGHT_BACKWARD_PIN,
)

# 20 kHz: above hearing. From drive.driver.maxPwmKhz.
_PWM_HZ = const(20000)
_FULL_PWM = const(65535)  # of duty_u16()
_DUTY_BITS = const(12)  # a full duty is 2^12


class _Motor:
    def __init__(self, forward_pin, backward_pin):
        self._forward = PWM(Pin(forward_pin, Pin.OUT, value=0), freq=_PWM_HZ, duty_u16=0)
        self._backward = PWM(Pin(backward_pin, Pin.OUT, value=0), freq=_PWM_HZ, duty_u16=0)

    def set(self, duty_q12):
        forward = duty_q12 >= 0
        size = duty_q12 if forward else -duty_q12
        braked = _FULL_PWM - ((size * _FULL_PWM) >> _DUTY_BITS)
        self._forward.duty_u16(_FULL_PWM if forward else braked)
        self._backward.duty_u16(braked if forward else _FULL_PWM)

    def off(self):
        self._forward.duty_u16(0)
        self._backward.duty_u16(0)


_left = _Motor(LEFT_FORWARD_PIN, LEFT_BACKWARD_PIN)
_right = _Motor(RIGHT_FORWARD_PIN, RIGHT_BACKWARD_PIN)


def set_duties(left_q12, right_q12):
    """Drives the wheels: -FULL_DUTY_Q12 to FULL_DUTY_Q12, positive forward."""
    _left.set(left_q12)
    _right.set(right_q12)


def off():
    """No current to either motor: the wheels run out."""
    _left.off()
    _right.off()
