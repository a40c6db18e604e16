// Numbers in and out through standard streams, 32 bits each, in the machine's own byte order.
#pragma once
#include <stdint.h>
#include <stdio.h>
#include <stdlib.h>

inline void openStreams() {}
inline void closeStreams() {}
inline void markStep(bool) {}

inline int32_t getNumber() {
  int32_t number;
  if (fread(&number, sizeof number, 1, stdin) != 1) exit(3);
  return number;
}

inline void putNumber(int32_t number) {
  fwrite(&number, sizeof number, 1, stdout);
}
