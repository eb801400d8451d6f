/*
 * The arrival times of theory/arrival-field.ts from scratch, written otherwise: the same eight triangles a cell, with a
 * binary heap (entries are left behind when a cell is improved) instead of buckets, in C. Reads a map from a file:
 * int32 width, height, rounds, starts; float32 crossing of each cell; int32 cells of the starts; float32 their years.
 * Prints the processor time of the fastest round and the sum of all times.
 */
#include <math.h>
#include <stdint.h>
#include <stdio.h>
#include <stdlib.h>
#include <time.h>

static float *times, *crossing;
static int row;

typedef struct {
  float time;
  int32_t cell;
} Entry;
static Entry *heap;
static size_t held, room;

static void push(float time, int32_t cell) {
  if (held == room) heap = realloc(heap, (room *= 2) * sizeof *heap);
  size_t at = held++;
  while (at > 0 && heap[(at - 1) / 2].time > time) {
    heap[at] = heap[(at - 1) / 2];
    at = (at - 1) / 2;
  }
  heap[at] = (Entry){time, cell};
}

static Entry pop(void) {
  Entry first = heap[0], last = heap[--held];
  size_t at = 0;
  for (;;) {
    size_t child = 2 * at + 1;
    if (child >= held) break;
    if (child + 1 < held && heap[child + 1].time < heap[child].time) child++;
    if (heap[child].time >= last.time) break;
    heap[at] = heap[child];
    at = child;
  }
  heap[at] = last;
  return first;
}

static inline double over(double a, double corner, double c) {
  if (!(corner < a)) return a + c;
  double ahead = a - corner;
  return ahead < c * M_SQRT1_2 ? a + sqrt(c * c - ahead * ahead) : corner + M_SQRT2 * c;
}

static inline void offer(int cell, double time) {
  float t = (float)time;
  if (t < times[cell]) {
    times[cell] = t;
    push(t, cell);
  }
}

static inline void beside(int cell, float t, int one, int other) {
  float c = crossing[cell];
  if (c == INFINITY || !(times[cell] > t)) return;
  offer(cell, over(t, fminf(times[one], times[other]), c));
}

static inline void across(int cell, float t, int one, int other) {
  float c = crossing[cell];
  if (c == INFINITY || !(times[cell] > t)) return;
  double least = INFINITY;
  if (crossing[one] < INFINITY && times[one] > t) least = over(times[one], t, c);
  if (crossing[other] < INFINITY && times[other] > t) least = fmin(least, over(times[other], t, c));
  if (least < INFINITY) offer(cell, least);
}

static void flow(void) {
  while (held > 0) {
    Entry first = pop();
    float t = first.time;
    int cell = first.cell;
    if (times[cell] != t) continue;
    int n = cell - row, s = cell + row, w = cell - 1, e = cell + 1;
    beside(w, t, n, s);
    beside(e, t, n, s);
    beside(n, t, w, e);
    beside(s, t, w, e);
    across(n - 1, t, n, w);
    across(n + 1, t, n, e);
    across(s - 1, t, s, w);
    across(s + 1, t, s, e);
  }
}

static void need(void *to, size_t size, size_t count, FILE *file) {
  if (fread(to, size, count, file) != count) {
    fprintf(stderr, "the case is cut short\n");
    exit(1);
  }
}

int main(int argc, char **argv) {
  if (argc < 2) return 1;
  FILE *file = fopen(argv[1], "rb");
  if (!file) return 1;
  int32_t head[4];
  need(head, sizeof *head, 4, file);
  int width = head[0], height = head[1], rounds = head[2], starts = head[3];
  row = width + 2;
  size_t cells = (size_t)row * (height + 2);
  times = malloc(cells * sizeof *times);
  crossing = malloc(cells * sizeof *crossing);
  for (size_t i = 0; i < cells; i++) crossing[i] = INFINITY;
  for (int y = 0; y < height; y++) need(crossing + (size_t)(y + 1) * row + 1, sizeof(float), width, file);
  int32_t *at = malloc(starts * sizeof *at);
  float *years = malloc(starts * sizeof *years);
  need(at, sizeof *at, starts, file);
  need(years, sizeof *years, starts, file);
  heap = malloc((room = 1 << 16) * sizeof *heap);
  double best = INFINITY, sum = 0;
  for (int round = 0; round < rounds; round++) {
    struct timespec from, to;
    clock_gettime(CLOCK_PROCESS_CPUTIME_ID, &from);
    for (size_t i = 0; i < cells; i++) times[i] = INFINITY;
    for (int i = 0; i < starts; i++) offer((at[i] / width + 1) * row + at[i] % width + 1, years[i]);
    flow();
    clock_gettime(CLOCK_PROCESS_CPUTIME_ID, &to);
    double seconds = (to.tv_sec - from.tv_sec) + (to.tv_nsec - from.tv_nsec) * 1e-9;
    if (seconds < best) best = seconds;
  }
  for (size_t i = 0; i < cells; i++)
    if (times[i] < INFINITY) sum += times[i];
  printf("%.6f %.3f\n", best, sum);
  return 0;
}
