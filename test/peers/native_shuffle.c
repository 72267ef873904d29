// Peer: Moran's I of shuffled maps, one thread. Usage: native_shuffle JOB REPEATS
// Prints the milliseconds of each repeat, then the mean of all quadratic forms.
#include "native_stream.h"

enum { LANES = 8, ROWS = 32 };
typedef float Singles __attribute__((vector_size(LANES * 4), aligned(16)));
typedef float Four __attribute__((vector_size(16), aligned(4)));

// Swaps the last of `left` values with any of them; biased bits are passed over.
static inline uint32_t settle_last(float *values, uint32_t left, uint32_t bits) {
  uint64_t product = (uint64_t)bits * left;
  uint32_t low = product;
  if (__builtin_expect(low < left, 0) && low < (0u - left) % left) return left;
  uint32_t chosen = product >> 32;
  left--;
  float kept = values[left];
  values[left] = values[chosen];
  values[chosen] = kept;
  return left;
}

static void shuffle(float *values, uint32_t n, const Stream *stream) {
  uint64_t a = stream->s[0], b = stream->s[1], c = stream->s[2], d = stream->s[3];
  for (uint32_t left = n; left > 1;) {
    uint64_t word = turn(b * 5, 7) * 9, shifted = b << 17;
    c ^= a;
    d ^= b;
    b ^= c;
    a ^= d;
    c ^= shifted;
    d = turn(d, 45);
    left = settle_last(values, left, word);
    if (left > 1) left = settle_last(values, left, word >> 32);
  }
}

static void interleave(const float *columns, uint32_t n, float *lanes) {
  uint32_t i = 0;
  for (; i + 4 <= n; i += 4)
    for (int half = 0; half < LANES; half += 4) {
      const float *from = columns + (size_t)half * n + i;
      Four a = *(const Four *)from, b = *(const Four *)(from + n);
      Four c = *(const Four *)(from + 2 * (size_t)n), d = *(const Four *)(from + 3 * (size_t)n);
      Four ab = __builtin_shufflevector(a, b, 0, 4, 1, 5), cd = __builtin_shufflevector(c, d, 0, 4, 1, 5);
      Four AB = __builtin_shufflevector(a, b, 2, 6, 3, 7), CD = __builtin_shufflevector(c, d, 2, 6, 3, 7);
      float *to = lanes + (size_t)i * LANES + half;
      *(Four *)to = __builtin_shufflevector(ab, cd, 0, 1, 4, 5);
      *(Four *)(to + LANES) = __builtin_shufflevector(ab, cd, 2, 3, 6, 7);
      *(Four *)(to + 2 * LANES) = __builtin_shufflevector(AB, CD, 0, 1, 4, 5);
      *(Four *)(to + 3 * LANES) = __builtin_shufflevector(AB, CD, 2, 3, 6, 7);
    }
  for (; i < n; i++)
    for (int lane = 0; lane < LANES; lane++) lanes[(size_t)i * LANES + lane] = columns[(size_t)lane * n + i];
}

int main(int argc, char **argv) {
  if (argc < 3) return 2;
  FILE *file = fopen(argv[1], "rb");
  if (!file) return 1;
  uint32_t *head = take(file, 20);
  uint32_t n = head[0], pairs = head[1], permutations = head[4];
  uint64_t seed = (uint64_t)head[3] << 32 | head[2];
  float *values = take(file, 4ul * n);
  uint32_t *offsets = take(file, 4ul * (n + 1)), *indices = take(file, 4ul * pairs);
  float *weights = take(file, 4ul * pairs);
  float *columns = room(4ul * LANES * n);
  Singles *lanes = room(sizeof(Singles) * (size_t)n);
  static Stream stream;
  double mean = 0;
  for (int repeat = 0; repeat < atoi(argv[2]); repeat++) {
    double begun = now();
    mean = 0;
    for (uint32_t first = 0; first < permutations; first += LANES) {
      for (int lane = 0; lane < LANES; lane++) {
        memcpy(columns + (size_t)lane * n, values, 4ul * n);
        open_stream(&stream, seed, 1, first + lane);
        shuffle(columns + (size_t)lane * n, n, &stream);
      }
      interleave(columns, n, (float *)lanes);
      double totals[LANES] = {0};
      for (uint32_t i = 0; i < n;) {
        uint32_t until = i + ROWS < n ? i + ROWS : n;
        Singles block = {0};
        for (; i < until; i++) {
          Singles row = {0};
          for (uint32_t e = offsets[i]; e < offsets[i + 1]; e++) row += weights[e] * lanes[indices[e]];
          block += row * lanes[i];
        }
        for (int lane = 0; lane < LANES; lane++) totals[lane] += block[lane];
      }
      for (uint32_t lane = 0; lane < LANES && first + lane < permutations; lane++) mean += totals[lane] / permutations;
    }
    printf("%.3f\n", now() - begun);
  }
  printf("mean %.9g\n", mean);
}
