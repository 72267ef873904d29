// Peer: weighed local counts (unequal weights), one thread. Usage: native_weighed JOB REPEATS
// Prints the milliseconds of each repeat, then a checksum of all counts.
#include <math.h>

#include "native_stream.h"

enum { BLOCK = 1024, LANES = 16, TOGETHER = 4 };
typedef float Singles __attribute__((vector_size(LANES * 4), aligned(4)));
typedef int32_t Flags __attribute__((vector_size(LANES * 4), aligned(4)));

static uint32_t n, areas, draws, *offsets, *dealt, *drawn, *marks;
static double *z, *weights, *observed;
static float *singles, *table, *above, *below;
static const double tie = 1e-10;

static double weighed_sum(uint32_t row, uint32_t p, uint32_t without) {
  uint32_t start = offsets[row], length = offsets[row + 1] - start;
  double sum = 0;
  for (uint32_t m = 0; m < length; m++)
    sum += weights[start + m] * z[dealt[(m == without ? length : m) * BLOCK + p]];
  return sum;
}

static void count_exactly(uint32_t row, uint32_t p, uint32_t *at_least, uint32_t *at_most) {
  double sum = weighed_sum(row, p, UINT32_MAX);
  at_least[row] += sum >= observed[row] - tie;
  at_most[row] += sum <= observed[row] + tie;
}

// Four rows abreast, sixteen permutations at a time.
static void weigh_rows(uint32_t first, uint32_t last, uint32_t count, uint32_t *at_least, uint32_t *at_most) {
  float paired[TOGETHER][1024];
  uint32_t rows[TOGETHER], longest = 0;
  for (int r = 0; r < TOGETHER; r++) {
    rows[r] = first + r < last ? first + r : last - 1;
    uint32_t length = offsets[rows[r] + 1] - offsets[rows[r]];
    if (length > longest) longest = length;
  }
  for (int r = 0; r < TOGETHER; r++)
    for (uint32_t m = 0; m < longest; m++)
      paired[r][m] = m < offsets[rows[r] + 1] - offsets[rows[r]] ? singles[offsets[rows[r]] + m] : 0;
  Flags more[TOGETHER] = {0}, less[TOGETHER] = {0};
  for (uint32_t p = 0; p < count; p += LANES) {
    Singles sums[TOGETHER] = {0};
    for (uint32_t m = 0; m < longest; m++) {
      Singles line = *(const Singles *)(table + m * BLOCK + p);
      for (int r = 0; r < TOGETHER; r++) sums[r] += line * paired[r][m];
    }
    for (int r = 0; r < TOGETHER && first + r < last; r++) {
      if (p + LANES > count) {
        for (uint32_t q = p; q < count; q++) count_exactly(rows[r], q, at_least, at_most);
        continue;
      }
      Flags is_more = sums[r] > above[rows[r]], is_less = sums[r] < below[rows[r]];
      more[r] -= is_more;
      less[r] -= is_less;
      Flags settled = is_more | is_less;
      int32_t all = -1;
      for (int q = 0; q < LANES; q++) all &= settled[q];
      if (all) continue;
      for (int q = 0; q < LANES; q++)
        if (!settled[q]) count_exactly(rows[r], p + q, at_least, at_most);
    }
  }
  for (int r = 0; r < TOGETHER && first + r < last; r++)
    for (int q = 0; q < LANES; q++) at_least[rows[r]] += more[r][q], at_most[rows[r]] += less[r][q];
}

static void take_own_areas_out(uint32_t count, uint32_t *at_least, uint32_t *at_most) {
  for (uint32_t m = 0; m + 1 < draws; m++)
    for (uint32_t p = 0; p < count; p++) {
      uint32_t row = dealt[m * BLOCK + p];
      if (row >= areas || m >= offsets[row + 1] - offsets[row]) continue;
      double sum = weighed_sum(row, p, UINT32_MAX), replaced = weighed_sum(row, p, m);
      at_least[row] += (replaced >= observed[row] - tie) - (sum >= observed[row] - tie);
      at_most[row] += (replaced <= observed[row] + tie) - (sum <= observed[row] + tie);
    }
}

int main(int argc, char **argv) {
  if (argc < 3) return 2;
  FILE *file = fopen(argv[1], "rb");
  if (!file) return 1;
  uint32_t *head = take(file, 28);
  n = head[0], areas = head[1], draws = head[2];
  uint64_t seed = (uint64_t)head[4] << 32 | head[3];
  uint32_t permutations = head[5], links = head[6];
  z = take(file, 8ul * n);
  observed = take(file, 8ul * areas);
  weights = take(file, 8ul * links);
  offsets = take(file, 4ul * (areas + 1));
  singles = room(4ul * links), above = room(4ul * areas), below = room(4ul * areas);
  dealt = room(4ul * BLOCK * draws), table = room(4ul * BLOCK * draws), drawn = room(4ul * draws);
  marks = room(4ul * n);
  uint32_t *at_least = room(4ul * areas), *at_most = room(4ul * areas);
  static Stream stream;
  for (int repeat = 0; repeat < atoi(argv[2]); repeat++) {
    double begun = now(), farthest = 0;
    memset(at_least, 0, 4ul * areas), memset(at_most, 0, 4ul * areas), memset(marks, 0, 4ul * n);
    for (uint32_t i = 0; i < n; i++) farthest = fmax(farthest, fabs(z[i]));
    for (uint32_t e = 0; e < links; e++) singles[e] = weights[e];
    for (uint32_t i = 0; i < areas; i++) {
      double sizes = 0;
      for (uint32_t e = offsets[i]; e < offsets[i + 1]; e++) sizes += fabs(weights[e]);
      double error = (offsets[i + 1] - offsets[i] + 6) * 0x1p-24 * sizes * farthest + tie;
      double slack = error + (fabs(observed[i]) + error) * 0x1p-22;
      above[i] = observed[i] + slack, below[i] = observed[i] - slack;
    }
    for (uint32_t first = 0; first < permutations; first += BLOCK) {
      uint32_t count = permutations - first < BLOCK ? permutations - first : BLOCK;
      open_stream(&stream, seed, 3, first / BLOCK);
      for (uint32_t p = 0; p < count; p++) {
        draw_distinct(&stream, drawn, draws, n, marks, first + p + 1);
        for (uint32_t m = 0; m < draws; m++) {
          dealt[m * BLOCK + p] = drawn[m];
          table[m * BLOCK + p] = z[drawn[m]];
        }
      }
      for (uint32_t i = 0; i < areas; i += TOGETHER)
        weigh_rows(i, i + TOGETHER < areas ? i + TOGETHER : areas, count, at_least, at_most);
      take_own_areas_out(count, at_least, at_most);
    }
    printf("%.3f\n", now() - begun);
  }
  uint32_t sum = 0;
  for (uint32_t i = 0; i < areas; i++) sum = checksum(at_most + i, 1, checksum(at_least + i, 1, sum));
  printf("checksum %u\n", sum);
}
