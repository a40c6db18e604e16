# mist_cart: firmware of a line-tracking vehicle on ESP32 development board (ESP32).
# Written by fairlead 0.1.0 from the build sheet with SHA-256
# 8ce924c562c9897f6be459cc3343b427cc64f99cbfea16dd6f0478bab1bd327f
# Change the sheet and render again; edits here are refused then, not lost. user_hooks is yours.
#
# This firmware is no safety function. Where the vehicle could hurt someone, guarding, emergency
# stop and personnel detection are separate, rated equipment under local codes, planned by
# competent, licensed people (driverless industrial trucks: ISO 3691-4; stop categories: IEC
# 60204-1).
# First run: wheels off the floor. Check that both turn forward, and that the button stops them.
# Battery: fuse it at its terminal, never short it, stop at its lowest voltage, charge it under
# supervision with a charger made for its cells.
#
# Start: set the vehicle on the line and press the button. After the countdown it drives.
# Pressing again stops it.
# Nothing moves without the button, after a reset neither. To go on after a stop, press it
# again.
#
# LED: on while driving, flashing without a pause during the countdown, else a number of
# flashes:
# 1 flash: ready
# 2 flashes: stopped by the button
# 3 flashes: the line was lost and the search did not find it
# 4 flashes: the run limit was reached
# 5 flashes: the control loop missed its period too often
# 6 flashes: restarted by the watchdog after the program hung
#
# To the board, in this folder (pip install mpremote):
# mpremote cp constants.py pins.py sensing.py steering.py motors.py board.py states.py :
# mpremote cp blink.py supervisor.py user_hooks.py main.py :
# mpremote reset
# boot.py stays as it is. The first run starts the watchdog, which nothing stops: from then on
# the board restarts by itself when the program is interrupted; switch it off and on before
# changing files.

import motors  # before anything else: motors off

try:
    import supervisor

    supervisor.run()
finally:
    motors.off()
