# Part of the firmware of mist_cart. Written by fairlead 0.1.0; change the build sheet, not this
# file.
#
# Which pin does what, by its GPIO number.

from micropython import const

# Sensors, the leftmost first. From sensors.pins.
SENSOR_PINS = (36, 39, 34, 35, 32, 33)

# Speed of the left motor. From drive.driver.left.pwm.
LEFT_PWM_PIN = const(25)

# Input that drives the left wheel forward. From drive.driver.left.in1.
LEFT_FORWARD_PIN = const(26)

# Input that drives the left wheel backward. From drive.driver.left.in2.
LEFT_BACKWARD_PIN = const(27)

# Speed of the right motor. From drive.driver.right.pwm.
RIGHT_PWM_PIN = const(14)

# Input that drives the right wheel forward, swapped as inverted says. From
# drive.driver.right.in2.
RIGHT_FORWARD_PIN = const(23)

# Input that drives the right wheel backward, swapped as inverted says. From
# drive.driver.right.in1.
RIGHT_BACKWARD_PIN = const(13)

# High lets the driver work, low cuts both motors off. From drive.driver.standbyPin.
STANDBY_PIN = const(22)

# Start button, to ground, with the internal pull-up. From start.buttonPin.
BUTTON_PIN = const(4)

# The LED of most boards of this kind.
LED_PIN = const(2)
