// Part of the firmware of misting-cart. Written by fairlead 0.1.0; change the build sheet, not
// this file.
//
// Products of 16-bit numbers, the dearest thing that the control law does.
#pragma once

#include <stdint.h>

// The chip multiplies bytes: four byte products make one of 16 bits. The compiler calls a function
// for that, which takes twice as long (Atmel application note AVR201, muls16x16_32).
inline int32_t product(int16_t a, int16_t b) {
#ifdef __AVR__
  int32_t result;
  uint8_t zero;
  asm("clr %[zero]\n\t"
      "muls %B[a], %B[b]\n\t"
      "movw %C[result], r0\n\t"
      "mul %A[a], %A[b]\n\t"
      "movw %A[result], r0\n\t"
      "mulsu %B[a], %A[b]\n\t"
      "sbc %D[result], %[zero]\n\t"
      "add %B[result], r0\n\t"
      "adc %C[result], r1\n\t"
      "adc %D[result], %[zero]\n\t"
      "mulsu %B[b], %A[a]\n\t"
      "sbc %D[result], %[zero]\n\t"
      "add %B[result], r0\n\t"
      "adc %C[result], r1\n\t"
      "adc %D[result], %[zero]\n\t"
      "clr __zero_reg__"
      : [result] "=&r"(result), [zero] "=&r"(zero)
      : [a] "a"(a), [b] "a"(b));
  return result;
#else
  return int32_t{a} * b;
#endif
}

// The high word of a number. A shift by 16 moves whole bytes; others go bit by bit.
inline int16_t highWord(int32_t number) {
  return static_cast<int16_t>(number >> 16);
}

// The high word of a product, as cheap as can be.
inline int16_t highProduct(int16_t a, int16_t b) {
#ifdef __AVR__
  int16_t result;
  uint8_t zero;
  uint8_t low;
  asm("clr %[zero]\n\t"
      "muls %B[a], %B[b]\n\t"
      "movw %A[result], r0\n\t"
      "mul %A[a], %A[b]\n\t"
      "mov %[low], r1\n\t"
      "mulsu %B[a], %A[b]\n\t"
      "sbc %B[result], %[zero]\n\t"
      "add %[low], r0\n\t"
      "adc %A[result], r1\n\t"
      "adc %B[result], %[zero]\n\t"
      "mulsu %B[b], %A[a]\n\t"
      "sbc %B[result], %[zero]\n\t"
      "add %[low], r0\n\t"
      "adc %A[result], r1\n\t"
      "adc %B[result], %[zero]\n\t"
      "clr __zero_reg__"
      : [result] "=&r"(result), [zero] "=&r"(zero), [low] "=&r"(low)
      : [a] "a"(a), [b] "a"(b));
  return result;
#else
  return highWord(product(a, b));
#endif
}

// Adds a product to a sum.
inline void addProduct(int32_t& sum, int16_t a, int16_t b) {
#ifdef __AVR__
  uint8_t zero;
  asm("clr %[zero]\n\t"
      "muls %B[a], %B[b]\n\t"
      "add %C[sum], r0\n\t"
      "adc %D[sum], r1\n\t"
      "mul %A[a], %A[b]\n\t"
      "add %A[sum], r0\n\t"
      "adc %B[sum], r1\n\t"
      "adc %C[sum], %[zero]\n\t"
      "adc %D[sum], %[zero]\n\t"
      "mulsu %B[a], %A[b]\n\t"
      "sbc %D[sum], %[zero]\n\t"
      "add %B[sum], r0\n\t"
      "adc %C[sum], r1\n\t"
      "adc %D[sum], %[zero]\n\t"
      "mulsu %B[b], %A[a]\n\t"
      "sbc %D[sum], %[zero]\n\t"
      "add %B[sum], r0\n\t"
      "adc %C[sum], r1\n\t"
      "adc %D[sum], %[zero]\n\t"
      "clr __zero_reg__"
      : [sum] "+r"(sum), [zero] "=&r"(zero)
      : [a] "a"(a), [b] "a"(b));
#else
  sum += int32_t{a} * b;
#endif
}
