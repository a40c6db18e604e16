// Numbers in and out through the three general-purpose registers, which the emulator watches:
// GPIOR0 gives and takes the bytes of a number, lowest first; GPIOR1 marks a step; GPIOR2 ends the run.
#pragma once
#include <avr/io.h>
#include <stdint.h>

inline void openStreams() {}

inline void closeStreams() {
  GPIOR2 = 1;
}

inline void markStep(bool begins) {
  GPIOR1 = begins;
}

inline int32_t getNumber() {
  uint32_t number = 0;
  for (int shift = 0; shift < 32; shift += 8) number |= uint32_t{GPIOR0} << shift;
  return static_cast<int32_t>(number);
}

inline void putNumber(int32_t number) {
  for (int shift = 0; shift < 32; shift += 8) GPIOR0 = static_cast<uint8_t>(static_cast<uint32_t>(number) >> shift);
}
