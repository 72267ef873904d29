// Peer: ranked local counts (equal weights in a row), one thread. Usage: native_ranked JOB REPEATS
// Prints the milliseconds of each repeat, then a checksum of all counts.
#include "native_stream.h"

typedef struct {
  double z, observed;
  uint32_t degree, at_least, at_most, unused;
} Area;

enum { BLOCK = 1024 };

static void sort_doubles(uint64_t *values, uint64_t *other, uint32_t count) {
  static uint32_t bins[6][2048];
  memset(bins, 0, sizeof bins);
  for (uint32_t i = 0; i < count; i++) {
    uint64_t key = values[i] ^ ((uint64_t)((int64_t)values[i] >> 63) | 1ull << 63);
    values[i] = key;
    for (int pass = 0; pass < 6; pass++) bins[pass][key >> 11 * pass & 2047]++;
  }
  for (int pass = 0; pass < 6; pass++) {
    uint32_t start = 0;
    for (int bin = 0; bin < 2048; bin++) {
      uint32_t size = bins[pass][bin];
      bins[pass][bin] = start;
      start += size;
    }
    for (uint32_t i = 0; i < count; i++) other[bins[pass][values[i] >> 11 * pass & 2047]++] = values[i];
    uint64_t *kept = values;
    values = other;
    other = kept;
  }
  for (uint32_t i = 0; i < count; i++) values[i] ^= ((values[i] >> 63) - 1) | 1ull << 63;
}

static void rank_areas(Area *areas, uint32_t first, uint32_t last, const double *sums, uint32_t count,
                       double tie) {
  uint32_t below = 0, up_to = 0;
  for (uint32_t i = first; i < last; i++) {
    double low = areas[i].observed - tie, high = areas[i].observed + tie;
    while (below < count && sums[below] < low) below++;
    while (below > 0 && sums[below - 1] >= low) below--;
    while (up_to < count && sums[up_to] <= high) up_to++;
    while (up_to > 0 && sums[up_to - 1] > high) up_to--;
    areas[i].at_least += count - below;
    areas[i].at_most += up_to;
  }
}

// Keeps the sums of the first k draws, and corrects areas that drew themselves.
static inline void take_out(Area *areas, const uint32_t *drawn, const double *running, uint32_t draws,
                            double tie, double *sums, const uint32_t *degrees, uint32_t degree_count,
                            size_t slice) {
  for (uint32_t d = 0; d < degree_count; d++) sums[d * slice] = running[degrees[d]];
  for (uint32_t m = 0; m + 1 < draws; m++) {
    Area *area = areas + drawn[m];
    if (m >= area->degree) continue;
    double sum = running[area->degree], replaced = sum - area->z + areas[drawn[area->degree]].z;
    double low = area->observed - tie, high = area->observed + tie;
    area->at_least += (replaced >= low) - (sum >= low);
    area->at_most += (replaced <= high) - (sum <= high);
  }
}

int main(int argc, char **argv) {
  if (argc < 3) return 2;
  FILE *file = fopen(argv[1], "rb");
  if (!file) return 1;
  uint32_t *head = take(file, 32);
  uint32_t n = head[0], tested = head[1], degree_count = head[2], draws = head[3], slice = head[4];
  uint64_t seed = (uint64_t)head[6] << 32 | head[5];
  uint32_t permutations = head[7];
  double *z = take(file, 8ul * n), *observed = take(file, 8ul * tested);
  uint32_t *degrees = take(file, 4ul * degree_count), *starts = take(file, 4ul * (degree_count + 1));
  Area *areas = room(sizeof(Area) * (size_t)n);
  double *sums = room(8ul * slice * degree_count), *other = room(8ul * slice);
  uint32_t *drawn = room(4ul * draws * BLOCK), *marks = room(4ul * n);
  double *running = room(8ul * (draws + 1) * BLOCK);
  static Stream stream;
  const double tie = 1e-10;
  for (int repeat = 0; repeat < atoi(argv[2]); repeat++) {
    memset(areas, 0, sizeof(Area) * (size_t)n);
    memset(marks, 0, 4ul * n);
    for (uint32_t i = 0; i < n; i++) areas[i].z = z[i];
    for (uint32_t d = 0; d < degree_count; d++)
      for (uint32_t i = starts[d]; i < starts[d + 1]; i++) areas[i].degree = degrees[d], areas[i].observed = observed[i];
    double begun = now();
    for (uint32_t from = 0; from < permutations; from += slice) {
      uint32_t to = from + slice < permutations ? from + slice : permutations;
      for (uint32_t first = from; first < to; first += BLOCK) {
        uint32_t count = to - first < BLOCK ? to - first : BLOCK;
        open_stream(&stream, seed, 2, first / BLOCK);
        for (uint32_t p = 0; p < count; p++)
          draw_distinct(&stream, drawn + p * draws, draws, n, marks, first + p + 1);
        for (uint32_t p = 0; p < count; p++) {
          const uint32_t *mine = drawn + p * draws;
          double *sum = running + p * (draws + 1);
          for (uint32_t m = 0; m < draws; m++) sum[m + 1] = sum[m] + areas[mine[m]].z;
        }
        for (uint32_t p = 0; p < count; p++)
          take_out(areas, drawn + p * draws, running + p * (draws + 1), draws, tie,
                   sums + first + p - from, degrees, degree_count, slice);
      }
      for (uint32_t d = 0; d < degree_count; d++) {
        double *column = sums + (size_t)d * slice;
        sort_doubles((uint64_t *)column, (uint64_t *)other, to - from);
        rank_areas(areas, starts[d], starts[d + 1], column, to - from, tie);
      }
    }
    printf("%.3f\n", now() - begun);
  }
  uint32_t sum = 0;
  for (uint32_t i = 0; i < tested; i++) sum = checksum(&areas[i].at_least, 2, sum);
  printf("checksum %u\n", sum);
}
