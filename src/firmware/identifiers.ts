/**
 * The one place that makes or checks a name in emitted code.
 *
 * Reserved: keywords of C++ (ISO/IEC 14882:2020, 5.11, alternative tokens included) and of Python (keyword.kwlist and
 * softkwlist of 3.12), and names that the Arduino core and avr-libc define as macros or globals.
 * File names also avoid the device names of Windows, on which many carts are programmed.
 */
import { FairleadError } from '../sheet/problem.js';
import type { Language } from './literals.js';

const CPP_WORDS = `alignas alignof and and_eq asm auto bitand bitor bool break case catch char char8_t char16_t char32_t
  class compl concept const consteval constexpr constinit const_cast continue co_await co_return co_yield decltype
  default delete do double dynamic_cast else enum explicit export extern false float for friend goto if inline int long
  mutable namespace new noexcept not not_eq nullptr operator or or_eq private protected public register
  reinterpret_cast requires return short signed sizeof static static_assert static_cast struct switch template this
  thread_local throw true try typedef typeid typename union unsigned using virtual void volatile wchar_t while xor xor_eq`;

const ARDUINO_WORDS = `A0 A1 A2 A3 A4 A5 A6 A7 ADC ARDUINO B0 B1 BIN CHANGE DDRB DDRC DDRD DEC DEFAULT DISPLAY E2END
  EEPROM EULER EXTERNAL F FALLING F_CPU HALF_PI HEX HIGH INPUT INPUT_PULLUP INTERNAL LED_BUILTIN LOW LSBFIRST MSBFIRST
  NOT_A_PIN NOT_ON_TIMER NULL NUM_DIGITAL_PINS OCT OUTPUT PI PORTB PORTC PORTD PROGMEM RAMEND RISING SCL SDA SERIAL SP
  SPM SREG SS TWO_PI abs binary bit boolean byte constrain delay degrees highByte init interrupts loop lowByte main map
  max micros millis min noInterrupts radians random round setup sq tone word yield`;

const PYTHON_WORDS = `False None True and as assert async await break case class continue def del elif else except
  finally for from global if import in is lambda match nonlocal not or pass raise return try type while with yield _
  const main machine micropython`;

const WINDOWS_DEVICES = /^(con|prn|aux|nul|com[0-9]|lpt[0-9])$/i;

const RESERVED: Readonly<Record<Language, ReadonlySet<string>>> = {
  cpp: new Set(`${CPP_WORDS} ${ARDUINO_WORDS}`.split(/\s+/)),
  python: new Set(PYTHON_WORDS.split(/\s+/)),
};

/** Whether a name may be defined in emitted code of the language. */
export function isIdentifier(name: string, language: Language): boolean {
  if (!/^[A-Za-z][A-Za-z0-9_]*$/.test(name) || name.includes('__')) return false;
  return !RESERVED[language].has(name);
}

/**
 * The name itself, checked.
 *
 * @throws Error when it cannot be defined in the language: a defect of a view model
 */
export function identifier(name: string, language: Language): string {
  if (!isIdentifier(name, language)) throw new Error(`"${name}" cannot be a name in ${language}.`);
  return name;
}

/**
 * The vehicle's name as folder and file name. The sheet's schema admits only letters, digits, hyphen and underscore;
 * checked again here because a path is made from it.
 *
 * @throws FairleadError (bad input) when it could leave the folder or names a device
 */
export function fileName(name: string): string {
  if (/^[A-Za-z][A-Za-z0-9_-]{0,39}$/.test(name) && !WINDOWS_DEVICES.test(name)) return name;
  const message = `${JSON.stringify(name)} cannot name a folder on every system.`;
  const fix =
    'Take a name that begins with a letter, of letters, digits, hyphen and underscore, not CON, NUL or the like.';
  throw new FairleadError(message, {
    problems: [{ pointer: '/name', message, got: JSON.stringify(name), fix }],
  });
}
