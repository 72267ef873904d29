// Random numbers of the native peers: xoshiro256** filled a buffer at a time, as in the kernel.
#include <stdint.h>
#include <stdio.h>
#include <stdlib.h>
#include <string.h>
#include <time.h>

#define BUFFER 512

typedef struct {
  uint64_t s[4];
  uint32_t buffer[BUFFER];
  uint32_t at;
} Stream;

static uint64_t mix(uint64_t z) {
  z = (z ^ (z >> 30)) * 0xbf58476d1ce4e5b9ull;
  z = (z ^ (z >> 27)) * 0x94d049bb133111ebull;
  return z ^ (z >> 31);
}

static void open_stream(Stream *stream, uint64_t seed, uint32_t purpose, uint32_t index) {
  const uint64_t golden = 0x9e3779b97f4a7c15ull;
  uint64_t counter = mix(seed + golden) ^ ((uint64_t)purpose << 32 | index);
  for (int word = 0; word < 4; word++) stream->s[word] = mix(counter += golden);
  stream->at = BUFFER;
}

static inline uint64_t turn(uint64_t x, int bits) { return x << bits | x >> (64 - bits); }

static void refill(Stream *stream) {
  uint64_t a = stream->s[0], b = stream->s[1], c = stream->s[2], d = stream->s[3];
  for (int i = 0; i < BUFFER; i += 2) {
    uint64_t word = turn(b * 5, 7) * 9, shifted = b << 17;
    memcpy(stream->buffer + i, &word, 8);
    c ^= a;
    d ^= b;
    b ^= c;
    a ^= d;
    c ^= shifted;
    d = turn(d, 45);
  }
  stream->s[0] = a;
  stream->s[1] = b;
  stream->s[2] = c;
  stream->s[3] = d;
  stream->at = 0;
}

static inline uint32_t next_bits(Stream *stream) {
  if (__builtin_expect(stream->at == BUFFER, 0)) refill(stream);
  return stream->buffer[stream->at++];
}

static double now(void) {
  struct timespec t;
  clock_gettime(CLOCK_MONOTONIC, &t);
  return t.tv_sec * 1e3 + t.tv_nsec / 1e6;
}

// Everything a job file holds, one array after the other.
static void *take(FILE *file, size_t bytes) {
  void *memory = aligned_alloc(64, (bytes + 127) / 64 * 64);
  if (!memory || fread(memory, 1, bytes, file) != bytes) {
    fprintf(stderr, "The job file is too short\n");
    exit(1);
  }
  return memory;
}

// Zeros that no one has touched yet, as WebAssembly memory is: the first touch is paid by who touches.
static void *room(size_t bytes) {
  void *memory = calloc(bytes + 64, 1);
  if (!memory) exit(1);
  return memory;
}

// Distinct areas below n; with many draws a mark for each area, else comparison with all earlier ones.
static inline void draw_distinct(Stream *stream, uint32_t *drawn, uint32_t count, uint32_t n,
                                 uint32_t *marks, uint32_t mark) {
  const uint32_t least = (0u - n) % n;
  for (uint32_t m = 0; m < count;) {
    uint64_t product = (uint64_t)next_bits(stream) * n;
    if ((uint32_t)product < least) continue;
    uint32_t area = product >> 32;
    int seen = 0;
    if (count <= 32) {
      for (uint32_t q = 0; q < m && !seen; q++) seen = drawn[q] == area;
    } else {
      seen = marks[area] == mark;
      marks[area] = mark;
    }
    if (!seen) drawn[m++] = area;
  }
}

// One number for all counts, to compare with the project's own.
static inline uint32_t checksum(const uint32_t *counts, uint32_t length, uint32_t sum) {
  for (uint32_t i = 0; i < length; i++) sum = sum * 31 + counts[i];
  return sum;
}
