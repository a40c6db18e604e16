import { PICO, dualPwm } from './pin-changes.js';
import { testRules } from './rule-cases.js';

testRules({
  'language-fits-board': [
    {
      when: 'MicroPython on an Uno',
      changes: { '/target/language': 'micropython' },
      want: ['/target/language: Uno does not take micropython.'],
    },
    {
      when: 'Arduino on a Pico',
      changes: { '/target/board': 'pico' },
      want: ['/target/language: Pico does not take arduino.'],
    },
    { when: 'Arduino on a Nano', changes: { '/target/board': 'nano' }, want: [] },
  ],
  'pins-exist': [
    {
      when: 'a pin that only the Nano has',
      changes: { '/sensors/pins/5': 'A6' },
      want: ['/sensors/pins/5: Uno has no pin "A6" (sensor 6).'],
    },
    {
      when: 'the same pin on a Nano',
      changes: { '/target/board': 'nano', '/sensors/pins/5': 'a6' },
      want: [],
    },
    {
      when: 'the serial pins',
      changes: { '/start/buttonPin': 0, '/drive/driver/standbyPin': 'D1' },
      want: [
        '/drive/driver/standbyPin: Pin 1 (standby) is not free: it carries the serial link to the computer, by which the firmware is loaded.',
        '/start/buttonPin: Pin 0 (start button) is not free: it carries the serial link to the computer, by which the firmware is loaded.',
      ],
    },
    {
      when: 'flash pins of an ESP32, and one that does not exist',
      changes: {
        '/target': { board: 'esp32', language: 'micropython' },
        '/sensors/pins': [32, 33, 34, 35, 36, 6],
        '/start/buttonPin': 20,
      },
      want: [
        '/sensors/pins/5: Pin GPIO6 (sensor 6) is not free: it is wired to the flash memory inside the module.',
        '/drive/driver/left/in1: Pin GPIO7 (left in1) is not free: it is wired to the flash memory inside the module.',
        '/drive/driver/left/in2: Pin GPIO8 (left in2) is not free: it is wired to the flash memory inside the module.',
        '/drive/driver/right/pwm: Pin GPIO6 (right pwm) is not free: it is wired to the flash memory inside the module.',
        '/drive/driver/right/in1: Pin GPIO9 (right in1) is not free: it is wired to the flash memory inside the module.',
        '/drive/driver/right/in2: Pin GPIO10 (right in2) is not free: it is wired to the flash memory inside the module.',
        '/start/buttonPin: ESP32 development board has no pin 20 (start button).',
      ],
    },
    {
      when: 'the LED pin of a Pico',
      changes: { ...PICO, ...dualPwm(['GP0', 'GP25'], ['GP2', 'GP3']) },
      want: [
        "/drive/driver/left/in2: Pin GP25 (left in2) is not free: it drives the board's LED and is not led out.",
      ],
    },
  ],
  'pins-used-once': [
    {
      when: 'one pin under two names',
      changes: { '/start/buttonPin': 'D14' },
      want: ['/start/buttonPin: Pin A0 is taken twice: by sensor 1 (/sensors/pins/0) and by start button.'],
    },
    {
      when: 'an LED on the pin of a sensor',
      changes: { '/led': { pin: 'A0' } },
      want: ['/led/pin: Pin A0 is taken twice: by sensor 1 (/sensors/pins/0) and by LED.'],
    },
    {
      when: 'the stop input on the pin of the button',
      changes: { '/stopPin': 2 },
      want: ['/stopPin: Pin 2 is taken twice: by start button (/start/buttonPin) and by stop input.'],
    },
    {
      when: 'one pin for both motors',
      changes: { '/drive/driver/right/pwm': 5 },
      want: [
        '/drive/driver/right/pwm: Pin 5 is taken twice: by left pwm (/drive/driver/left/pwm) and by right pwm.',
      ],
    },
    {
      when: 'a pin that the scheme does not use',
      changes: { '/drive/driver/left/dir': 2 },
      want: [],
    },
  ],
  'pins-able': [
    {
      when: 'an analog sensor on a digital pin',
      changes: { '/sensors/pins/0': 4 },
      want: ['/sensors/pins/0: Pin 4 (sensor 1) cannot read a voltage.'],
    },
    {
      when: 'PWM on a pin without',
      changes: { '/drive/driver/left/pwm': 4 },
      want: ['/drive/driver/left/pwm: Pin 4 (left pwm) cannot do PWM.'],
    },
    {
      when: "a Nano's analog-only pins as output, button and digital sensor",
      changes: {
        '/target/board': 'nano',
        '/sensors/kind': 'digital',
        '/sensors/calibration': undefined,
        '/sensors/pins/0': 'A6',
        '/drive/driver/left/in1': 'A7',
        '/start/buttonPin': 'A7',
      },
      want: [
        '/sensors/pins/0: Pin A6 (sensor 1) cannot be a digital input.',
        '/drive/driver/left/in1: Pin A7 (left in1) cannot be an output.',
        '/start/buttonPin: Pin A7 (start button) has no internal pull-up for the button.',
      ],
    },
    {
      when: 'an input-only pin of an ESP32 as button and motor pin',
      changes: {
        '/target': { board: 'esp32', language: 'micropython' },
        '/sensors/pins': [32, 33, 36, 39, 37, 38],
        ...dualPwm([34, 19], [21, 22]),
        '/start/buttonPin': 35,
      },
      want: [
        '/drive/driver/left/in1: Pin GPIO34 (left in1) cannot do PWM.',
        '/start/buttonPin: Pin GPIO35 (start button) has no internal pull-up for the button.',
      ],
    },
  ],
  'driver-pins': [
    {
      when: 'pwm-dir with the pins of pwm-in-in',
      changes: { '/drive/driver/scheme': 'pwm-dir' },
      want: [
        '/drive/driver/left/dir: Driver scheme pwm-dir takes pwm and dir for each motor; dir of the left motor is missing.',
        '/drive/driver/left/in1: Driver scheme pwm-dir takes pwm and dir for each motor; in1 of the left motor is too many.',
        '/drive/driver/left/in2: Driver scheme pwm-dir takes pwm and dir for each motor; in2 of the left motor is too many.',
        '/drive/driver/right/dir: Driver scheme pwm-dir takes pwm and dir for each motor; dir of the right motor is missing.',
        '/drive/driver/right/in1: Driver scheme pwm-dir takes pwm and dir for each motor; in1 of the right motor is too many.',
        '/drive/driver/right/in2: Driver scheme pwm-dir takes pwm and dir for each motor; in2 of the right motor is too many.',
      ],
    },
    {
      when: 'a missing input',
      changes: { '/drive/driver/right/in2': undefined },
      want: [
        '/drive/driver/right/in2: Driver scheme pwm-in-in takes pwm, in1 and in2 for each motor; in2 of the right motor is missing.',
      ],
    },
    {
      when: 'a standby pin where there is none',
      changes: { ...dualPwm([3, 11], [9, 10]), '/drive/driver/standbyPin': 4 },
      want: ['/drive/driver/standbyPin: Driver scheme dual-pwm has no standby pin.'],
    },
    { when: 'a standby pin for pwm-in-in', changes: { '/drive/driver/standbyPin': 4 }, want: [] },
  ],
  'pin-cautions': [
    {
      when: 'the I2C pins of an Uno',
      changes: {},
      want: [
        '/sensors/pins/4: Each of pins A4 (sensor 5) and A5 (sensor 6): it is also a line of the I2C bus, so no I2C part can be added later.',
      ],
    },
    {
      when: 'the LED pin of a Nano, A6 and A7 for the I2C pins',
      changes: {
        '/target/board': 'nano',
        '/sensors/pins/4': 'A6',
        '/sensors/pins/5': 'A7',
        '/start/buttonPin': 13,
      },
      want: [
        "/start/buttonPin: Pin 13 (start button): the board's LED and its resistor hang on it, and it flickers while the boot loader runs.",
      ],
    },
    {
      when: 'the second converter and a strapping pin of an ESP32',
      changes: {
        '/target': { board: 'esp32', language: 'micropython' },
        '/sensors/pins': [32, 33, 34, 35, 36, 27],
        ...dualPwm([18, 19], [21, 25]),
        '/start/buttonPin': 0,
      },
      want: [
        '/sensors/pins/5: Pin GPIO27 (sensor 6): it is read by the second converter, which stops reading as soon as the radio is switched on.',
        '/start/buttonPin: Pin GPIO0 (start button): it is a strapping pin: held low at reset, the chip waits for a download instead of starting.',
      ],
    },
  ],
});
