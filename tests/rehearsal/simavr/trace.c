// Runs a flash image on simavr's ATmega328P and prints each change of the motors' registers with the cycle after it.
//
// Usage: trace IMAGE READINGS END_CYCLE PRESS_CYCLE RELEASE_CYCLE REGISTER...
// IMAGE: flash memory from address 0. READINGS: counts, 16 bits each, one for each conversion of the converter in turn.
// The button at PD2 is low from press to release. Output: lines of cycle, register (data address, hexadecimal) and value.
#include <simavr/avr_adc.h>
#include <simavr/avr_ioport.h>
#include <simavr/sim_avr.h>
#include <simavr/sim_irq.h>
#include <stdint.h>
#include <stdio.h>
#include <stdlib.h>
#include <string.h>

enum { MOST_WATCHED = 16 };

static avr_t *chip;
static uint16_t *readings;
static size_t reading_count;
static size_t taken;

static void converts(struct avr_irq_t *irq, uint32_t value, void *param) {
  (void)irq;
  (void)param;
  union {
    avr_adc_mux_t mux;
    uint32_t v;
  } trigger = {.v = value};
  const uint32_t count = taken < reading_count ? readings[taken++] : 0;
  // The least voltage that reads as the count: simavr takes 1023 / 5000 of it, cut.
  const uint32_t millivolts = (count * 5000 + 1022) / 1023;
  avr_raise_irq(avr_io_getirq(chip, AVR_IOCTL_ADC_GETIRQ, trigger.mux.src), millivolts);
}

static void *read_file(const char *path, size_t *bytes) {
  FILE *file = fopen(path, "rb");
  if (file == NULL) exit(2);
  fseek(file, 0, SEEK_END);
  *bytes = (size_t)ftell(file);
  rewind(file);
  void *content = malloc(*bytes);
  if (content == NULL || fread(content, 1, *bytes, file) != *bytes) exit(2);
  fclose(file);
  return content;
}

int main(int argc, char **argv) {
  if (argc < 7) return 2;
  size_t bytes;
  uint8_t *image = read_file(argv[1], &bytes);
  chip = avr_make_mcu_by_name("atmega328p");
  if (chip == NULL) return 3;
  avr_init(chip);
  chip->frequency = 16000000;
  chip->vcc = chip->avcc = chip->aref = 5000;
  chip->log = LOG_ERROR;
  if (bytes > chip->flashend + 1u) return 2;
  memcpy(chip->flash, image, bytes);
  chip->codeend = (uint32_t)bytes;
  readings = read_file(argv[2], &bytes);
  reading_count = bytes / sizeof *readings;
  const unsigned long long end = strtoull(argv[3], NULL, 10);
  const unsigned long long press = strtoull(argv[4], NULL, 10);
  const unsigned long long release = strtoull(argv[5], NULL, 10);
  // One instruction at a time.
  chip->run_cycle_limit = 1;
  const int watched = argc - 6 < MOST_WATCHED ? argc - 6 : MOST_WATCHED;
  uint16_t addresses[MOST_WATCHED];
  uint8_t values[MOST_WATCHED] = {0};
  for (int i = 0; i < watched; i++) addresses[i] = (uint16_t)strtoul(argv[6 + i], NULL, 16);
  avr_irq_register_notify(avr_io_getirq(chip, AVR_IOCTL_ADC_GETIRQ, ADC_IRQ_OUT_TRIGGER), converts, NULL);
  avr_irq_t *button = avr_io_getirq(chip, AVR_IOCTL_IOPORT_GETIRQ('D'), 2);
  int level = -1;
  while (chip->cycle < end) {
    const int wanted = !(chip->cycle >= press && chip->cycle < release);
    if (wanted != level) avr_raise_irq(button, (uint32_t)(level = wanted));
    const int state = avr_run(chip);
    if (state == cpu_Done || state == cpu_Crashed) return 4;
    for (int i = 0; i < watched; i++) {
      const uint8_t value = chip->data[addresses[i]];
      if (value == values[i]) continue;
      values[i] = value;
      printf("%llu %x %u\n", (unsigned long long)chip->cycle, addresses[i], value);
    }
  }
  return 0;
}
