// On the host every cast to 16 bits is watched: it may not change the number. The harness is compiled with exact<int16_t>(...)
// in the place of the firmware's static_cast<int16_t>(...).
#pragma once

#include <stdint.h>
#include <stdio.h>
#include <stdlib.h>

template <typename T, typename U>
constexpr T exact(U value) {
  return static_cast<U>(static_cast<T>(value)) == value
             ? static_cast<T>(value)
             : (fprintf(stderr, "%lld does not fit its type\n", static_cast<long long>(value)), abort(), T{});
}
