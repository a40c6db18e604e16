# Part of the firmware of potting-cart. Written by fairlead 0.1.0; change the build sheet, not
# this file.
#
# Which pin does what, by its GPIO number.

from micropython import const

# Sensors, the leftmost first. From sensors.pins.
SENSOR_PINS = (16, 17, 18, 19, 20, 21, 22, 26)

# Input that drives the left wheel forward. From drive.driver.left.in1.
LEFT_FORWARD_PIN = const(2)

# Input that drives the left wheel backward. From drive.driver.left.in2.
LEFT_BACKWARD_PIN = const(3)

# Input that drives the right wheel forward. From drive.driver.right.in1.
RIGHT_FORWARD_PIN = const(4)

# Input that drives the right wheel backward. From drive.driver.right.in2.
RIGHT_BACKWARD_PIN = const(5)

# Start button, to ground, with the internal pull-up. From start.buttonPin.
BUTTON_PIN = const(15)

# The board's own LED.
LED_PIN = "LED"
