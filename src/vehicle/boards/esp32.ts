/**
 * ESP32 development board (module with 4 MB flash) with MicroPython.
 *
 * Sources: ESP32 data sheet (strapping pins, pin list); ESP-IDF programming guide, "GPIO & RTC GPIO" (analog functions,
 * input-only pins, flash and serial pins, ADC2 and radio) and "LED Control" (16 channels); MicroPython documentation of
 * the esp32 port. Which GPIOs are led out is common practice for boards with 30 or 38 pins.
 * Timing is an estimate for MicroPython code that does not allocate, not a measurement.
 */
import type { BoardFacts, PinFacts } from '../board-facts.js';

/** GPIO 20, 24 and 28 to 31 do not exist. */
const GPIOS = Array.from({ length: 40 }, (_, gpio) => gpio).filter(
  (gpio) => gpio !== 20 && gpio !== 24 && (gpio < 28 || gpio > 31),
);
const INPUT_ONLY_FROM = 34;

/** Channel of each analog pin; the second converter serves the radio as well. */
const ADC1: Readonly<Record<number, number>> = { 36: 0, 37: 1, 38: 2, 39: 3, 32: 4, 33: 5, 34: 6, 35: 7 };
const ADC2: Readonly<Record<number, number>> = {
  4: 0,
  0: 1,
  2: 2,
  15: 3,
  13: 4,
  12: 5,
  14: 6,
  27: 7,
  25: 8,
  26: 9,
};
const ADC2_CAUTION =
  'it is read by the second converter, which stops reading as soon as the radio is switched on';

const FLASH = 'it is wired to the flash memory inside the module';
const SERIAL = 'it carries the serial link to the computer, by which the firmware is loaded';
const RESERVED: Readonly<Record<number, string>> = {
  1: SERIAL,
  3: SERIAL,
  6: FLASH,
  7: FLASH,
  8: FLASH,
  9: FLASH,
  10: FLASH,
  11: FLASH,
};

const MEMORY = 'modules with extra memory (PSRAM) use it themselves';
const NOT_LED_OUT = 'most boards do not lead it out';
const CAUTIONS: Readonly<Record<number, string>> = {
  0: 'it is a strapping pin: held low at reset, the chip waits for a download instead of starting',
  2: 'it is a strapping pin that has to be low or open for a download, and many boards have their LED on it',
  5: 'it is a strapping pin, and pulses while the chip starts',
  12: 'it is a strapping pin: held high at reset, it sets the wrong flash voltage and the chip does not start',
  15: 'it is a strapping pin, and pulses while the chip starts',
  16: MEMORY,
  17: MEMORY,
  37: NOT_LED_OUT,
  38: NOT_LED_OUT,
};

function adcOf(gpio: number): Pick<PinFacts, 'adc'> {
  const first = ADC1[gpio];
  if (first !== undefined) return { adc: { unit: 1, channel: first } };
  const second = ADC2[gpio];
  if (second !== undefined) return { adc: { unit: 2, channel: second, caution: ADC2_CAUTION } };
  return {};
}

function pin(gpio: number): PinFacts {
  const output = gpio < INPUT_ONLY_FROM;
  const reserved = RESERVED[gpio];
  const caution = CAUTIONS[gpio];
  return {
    label: `GPIO${gpio}`,
    aliases: [String(gpio), `IO${gpio}`, `D${gpio}`, `G${gpio}`],
    code: String(gpio),
    input: true,
    output,
    pullUp: output,
    interrupt: true,
    // One frequency serves both motors, so one timer does.
    ...(output ? { pwm: { timer: 0, channel: 'routed' } } : {}),
    ...adcOf(gpio),
    ...(reserved === undefined ? {} : { reserved }),
    ...(caution === undefined ? {} : { caution }),
  };
}

export const esp32: BoardFacts = {
  id: 'esp32',
  title: 'ESP32 development board',
  language: 'micropython',
  chip: 'ESP32',
  sources: [
    'ESP32 data sheet',
    'ESP-IDF programming guide: GPIO & RTC GPIO, LED Control, ADC oneshot mode',
    'MicroPython documentation, esp32 port',
  ],
  // What MicroPython sets unless told otherwise (from memory); the chip can do 240 MHz.
  clockHz: 160e6,
  logicV: 3.3,
  // The firmware reads read_u16() >> 4: the converter's own 12 bits.
  adcMaxCount: 4095,
  adcReadS: 60e-6,
  // A handler in Python: 20 to 30 us on such chips, from memory; to be measured on the board.
  edgeS: 30e-6,
  digitalReadS: 5e-6,
  computeS: 2e-3,
  // an estimate, as that is
  wheelLoopS: 4e-4,
  samplePeriodS: 5e-3,
  pwmHz: 20e3,
  // The range of duty_u16(); at 20 kHz the timer itself resolves 11 bits, as 80 MHz / 2^12 is already less than 20 kHz.
  // 80 MHz / 20 kHz leaves 11 whole bits
  pwmSteps: 2047,
  flashBytes: 4 * 1024 * 1024,
  ramBytes: 520 * 1024,
  adcAttenuated: true,
  pins: GPIOS.map(pin),
  led: { label: 'GPIO2', code: 'const(2)', about: 'The LED of most boards of this kind.' },
  wiring: [
    // ESP32 data sheet, converter with 11 dB attenuation: effective range 150 to 2450 mV.
    'The converter is accurate from about 0.15 V to 2.45 V only and saturates near 3.1 V: keep the sensors within it.',
    'GPIO34 to GPIO39 have no pull-up: a digital sensor with an open output needs a resistor to 3.3 V there.',
  ],
  flashing: [
    'A board without MicroPython: erase its flash and write the image of MicroPython for this chip with esptool, as the download page of MicroPython says for the board. Some boards need their BOOT button held while that begins.',
  ],
};
