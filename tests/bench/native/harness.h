/* Reads points, times step() over them and prints nanoseconds a step (the least of many batches), then the first point's step. */
#include <math.h>
#include <stdio.h>
#include <stdlib.h>
#include <string.h>
#include <time.h>

/* Fills d with the Newton step J(x) d = -F(x). */
static void step(const double *restrict x, double *restrict d);

static double now(void) {
  struct timespec t;
  clock_gettime(CLOCK_MONOTONIC, &t);
  return 1e9 * (double)t.tv_sec + (double)t.tv_nsec;
}

/* Arguments: unknowns, points, steps a batch, batches. Standard input: the points, as doubles. */
int main(int count, char **words) {
  if (count != 5) return 2;
  const int size = atoi(words[1]), points = atoi(words[2]), steps = atoi(words[3]), batches = atoi(words[4]);
  double *all = malloc(sizeof(double) * (size_t)size * (size_t)points);
  double *x = malloc(sizeof(double) * (size_t)size), *d = malloc(sizeof(double) * (size_t)size);
  if (fread(all, sizeof(double) * (size_t)size, (size_t)points, stdin) != (size_t)points) return 3;
  double least = INFINITY;
  for (int batch = 0; batch < batches; batch++) {
    const double begun = now();
    for (int k = 0; k < steps; k++) {
      memcpy(x, all + (size_t)size * (size_t)(k % points), sizeof(double) * (size_t)size);
      step(x, d);
      for (int j = 0; j < size; j++) x[j] += d[j];
    }
    const double each = (now() - begun) / steps;
    if (each < least) least = each;
  }
  step(all, d);
  printf("%.17g\n", least);
  for (int j = 0; j < size; j++) printf("%.17g\n", d[j]);
  return 0;
}
