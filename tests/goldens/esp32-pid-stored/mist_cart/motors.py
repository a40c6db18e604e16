# Part of the firmware of mist_cart. Written by fairlead 0.1.0; change the build sheet, not this
# file.
#
# The two direction inputs give the side, PWM the speed. Most drivers of this kind brake while PWM
# is low, which keeps slow driving even.
# Importing this module switches the motors off.

from machine import PWM, Pin
from micropython import const

from pins import (
    LEFT_PWM_PIN,
    LEFT_FORWARD_PIN,
    LEFT_BACKWARD_PIN,
    RIGHT_PWM_PIN,
    RIGHT_FORWARD_PIN,
    RIGHT_BACKWARD_PIN,
    STANDBY_PIN,
)

# 20 kHz: above hearing. From drive.driver.maxPwmKhz.
_PWM_HZ = const(20000)
_FULL_PWM = const(65535)  # of duty_u16()
_DUTY_BITS = const(12)  # a full duty is 2^12


class _Motor:
    def __init__(self, pwm_pin, forward_pin, backward_pin):
        self._pwm = PWM(Pin(pwm_pin, Pin.OUT, value=0), freq=_PWM_HZ, duty_u16=0)
        self._forward = Pin(forward_pin, Pin.OUT, value=0)
        self._backward = Pin(backward_pin, Pin.OUT, value=0)

    def set(self, duty_q12):
        forward = duty_q12 >= 0
        size = duty_q12 if forward else -duty_q12
        self._forward.value(forward)
        self._backward.value(not forward)
        self._pwm.duty_u16((size * _FULL_PWM) >> _DUTY_BITS)

    def off(self):
        self._pwm.duty_u16(0)
        self._forward.value(0)
        self._backward.value(0)


_standby = Pin(STANDBY_PIN, Pin.OUT, value=0)
_left = _Motor(LEFT_PWM_PIN, LEFT_FORWARD_PIN, LEFT_BACKWARD_PIN)
_right = _Motor(RIGHT_PWM_PIN, RIGHT_FORWARD_PIN, RIGHT_BACKWARD_PIN)


def set_duties(left_q12, right_q12):
    """Drives the wheels: -FULL_DUTY_Q12 to FULL_DUTY_Q12, positive forward."""
    _standby.value(1)
    _left.set(left_q12)
    _right.set(right_q12)


def off():
    """No current to either motor: the wheels run out."""
    _standby.value(0)
    _left.off()
    _right.off()
