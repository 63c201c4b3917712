/* Rank of a circulant over GF(2) by libm4ri, for comparison. Reads n, the number of offsets, the offsets; prints
 * rank and the least processor seconds of five runs. */
#include <m4ri/m4ri.h>
#include <stdio.h>
#include <time.h>

static double now(void) {
  struct timespec t;
  clock_gettime(CLOCK_PROCESS_CPUTIME_ID, &t);
  return t.tv_sec + 1e-9 * t.tv_nsec;
}

int main(void) {
  int n, weight, offsets[1024];
  if (scanf("%d %d", &n, &weight) != 2 || weight > 1024) return 1;
  for (int i = 0; i < weight; i++)
    if (scanf("%d", offsets + i) != 1) return 1;
  mzd_t *matrix = mzd_init(n, n);
  for (int row = 0; row < n; row++)
    for (int i = 0; i < weight; i++) mzd_write_bit(matrix, row, (offsets[i] + row) % n, 1);
  double best = 1e9;
  int rank = 0;
  for (int run = 0; run < 5; run++) {
    mzd_t *copy = mzd_copy(NULL, matrix);
    double start = now();
    rank = mzd_echelonize_m4ri(copy, 0, 0);
    double spent = now() - start;
    if (spent < best) best = spent;
    mzd_free(copy);
  }
  printf("%d %.9f\n", rank, best);
  return 0;
}
