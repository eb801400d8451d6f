/*
 * The step of the model in plain C: what a careful programmer would write for one thread and one map, without leaving
 * anything out. The same separable neighbourhood, the same rates, in counts mode the same Philox draws and the same
 * quantile by inversion. Single precision, so that the compiler can work on as many cells at once as the vectors hold.
 *
 * Reads a case as `case-file.ts` writes it and prints: seconds of the processor in the fastest round, and the sum of cover
 * after it.
 */
#include <math.h>
#include <stdint.h>
#include <stdio.h>
#include <stdlib.h>
#include <string.h>
#include <time.h>

typedef struct {
  int32_t width, height, radius, counts, steps, rounds;
  uint32_t k0, k1;
  float carry, recruits, years, background, drought, lossWidth, tolerance, exposureShift, refugeShift,
      neighbourShift, refugeGrowth, droughtIndex;
} Case;

static void *need(size_t bytes) {
  void *p = malloc(bytes);
  if (!p) exit(2);
  return p;
}
static void take(void *to, size_t bytes, FILE *from) {
  if (fread(to, 1, bytes, from) != bytes) exit(3);
}

static void spread(const float *in, float *out, const float *taps, int width, int height, int radius,
                   float *padded) {
  for (int y = 0; y < height; y++) {
    memcpy(padded + radius, in + (size_t)y * width, width * sizeof(float));
    for (int d = 0; d < radius; d++) {
      padded[radius - 1 - d] = padded[radius + d];
      padded[radius + width + d] = padded[radius + width - 1 - d];
    }
    float *row = out + (size_t)y * width;
    for (int x = 0; x < width; x++) row[x] = taps[0] * padded[x + radius];
    for (int d = 1; d <= radius; d++)
      for (int x = 0; x < width; x++) row[x] += taps[d] * (padded[x + radius - d] + padded[x + radius + d]);
  }
}
static int mirrored(int i, int n) { return i < 0 ? -1 - i : i < n ? i : 2 * n - 1 - i; }

/* q and S of one row; no branch and no alias, so that the compiler does use the vectors. */
static void chances(const Case *c, int width, const float *restrict heard, const uint8_t *restrict capacity,
                    const uint8_t *restrict vigour, const uint8_t *restrict exposure,
                    const uint8_t *restrict refuge, float *restrict q, float *restrict S) {
  const float unit = 1.0f / 255, recruits = c->recruits, growth = c->refugeGrowth, years = c->years;
  const float exposureShift = c->exposureShift, refugeShift = c->refugeShift, neighbourShift = c->neighbourShift;
  const float wet = c->droughtIndex - c->tolerance, sharp = 1 / c->lossWidth;
  const float background = c->background, drought = c->drought;
  for (int x = 0; x < width; x++) {
    float K = capacity[x] * unit, M = refuge[x] * unit, E = exposure[x] * unit;
    /* ground that holds nothing is left out below; a least K spares the branch here */
    float phi = heard[x] / fmaxf(K, 1e-9f), phi1 = fminf(phi, 1);
    q[x] = 1 - expf(-recruits * (vigour[x] * unit) * (1 + growth * M) * phi);
    float margin = (wet - exposureShift * E + refugeShift * M + neighbourShift * phi1) * sharp;
    S[x] = expf(-(background + drought / (1 + expf(margin))) * years);
  }
}
static void meanField(const Case *c, int width, const uint8_t *restrict capacity, const float *restrict q,
                      const float *restrict S, float *restrict cover) {
  const float carry = c->carry;
  for (int x = 0; x < width; x++) {
    float K = capacity[x] * (1.0f / 255), kept = carry * cover[x];
    cover[x] = fminf(S[x] * (kept + (K - kept) * q[x]), K);
  }
}

static void philox(uint32_t c0, uint32_t c1, uint32_t k0, uint32_t k1, uint32_t *out) {
  uint32_t c2 = 0, c3 = 0;
  for (int round = 0; round < 10; round++) {
    uint64_t a = (uint64_t)0xD2511F53u * c0, b = (uint64_t)0xCD9E8D57u * c2;
    c0 = (uint32_t)(b >> 32) ^ c1 ^ k0;
    c1 = (uint32_t)b;
    c2 = (uint32_t)(a >> 32) ^ c3 ^ k1;
    c3 = (uint32_t)a;
    k0 += 0x9E3779B9u;
    k1 += 0xBB67AE85u;
  }
  out[0] = c0, out[1] = c1, out[2] = c2, out[3] = c3;
}
static int walk(double u, int n, double p, int strict) {
  double odds = p / (1 - p), probability = 1, below;
  double base = 1 - p;
  for (int left = n; left > 0; left /= 2, base *= base)
    if (left & 1) probability *= base;
  below = probability;
  int k = 0;
  while (k < n && (strict ? below <= u : below < u)) {
    probability *= (double)(n - k) / (k + 1) * odds;
    k++;
    if (probability < 1e-18 && k > n * p) break;
    below += probability;
  }
  return k;
}
static int quantile(double u, int n, double p) {
  if (n == 0 || p <= 0) return 0;
  if (p >= 1) return n;
  return p > 0.5 ? n - walk(1 - u, n, 1 - p, 1) : walk(u, n, p, 0);
}

int main(int argc, char **argv) {
  if (argc < 2) return 1;
  FILE *file = fopen(argv[1], "rb");
  if (!file) return 1;
  Case c;
  take(&c, sizeof c, file);
  size_t cells = (size_t)c.width * c.height;
  float *taps = need((c.radius + 1) * sizeof(float));
  take(taps, (c.radius + 1) * sizeof(float), file);
  uint32_t sites[256];
  take(sites, sizeof sites, file);
  uint8_t *capacity = need(cells), *vigour = need(cells), *exposure = need(cells), *refuge = need(cells);
  take(capacity, cells, file);
  take(vigour, cells, file);
  take(exposure, cells, file);
  take(refuge, cells, file);
  float *start = need(cells * sizeof(float)), *cover = need(cells * sizeof(float));
  float *rows = need(cells * sizeof(float)), *row = need(c.width * sizeof(float));
  float *q = need(c.width * sizeof(float)), *S = need(c.width * sizeof(float));
  float *padded = need((c.width + 2 * c.radius) * sizeof(float));
  uint16_t *first = need(cells * sizeof(uint16_t)), *clumps = need(cells * sizeof(uint16_t));
  if (c.counts)
    take(first, cells * sizeof(uint16_t), file);
  else
    take(start, cells * sizeof(float), file);
  fclose(file);
  for (size_t i = 0; c.counts && i < cells; i++)
    start[i] = capacity[i] * (1.0f / 255) * ((float)first[i] / sites[capacity[i]]);

  double best = 1e300, sum = 0;
  for (int round = 0; round < c.rounds; round++) {
    memcpy(cover, start, cells * sizeof(float));
    memcpy(clumps, first, cells * sizeof(uint16_t));
    struct timespec from, to;
    clock_gettime(CLOCK_PROCESS_CPUTIME_ID, &from);
    for (int step = 0; step < c.steps; step++) {
      spread(cover, rows, taps, c.width, c.height, c.radius, padded);
      for (int y = 0; y < c.height; y++) {
        const float *here = rows + (size_t)y * c.width;
        for (int x = 0; x < c.width; x++) row[x] = taps[0] * here[x];
        for (int d = 1; d <= c.radius; d++) {
          const float *up = rows + (size_t)mirrored(y - d, c.height) * c.width;
          const float *down = rows + (size_t)mirrored(y + d, c.height) * c.width;
          for (int x = 0; x < c.width; x++) row[x] += taps[d] * (up[x] + down[x]);
        }
        size_t at = (size_t)y * c.width;
        chances(&c, c.width, row, capacity + at, vigour + at, exposure + at, refuge + at, q, S);
        if (!c.counts) {
          meanField(&c, c.width, capacity + at, q, S, cover + at);
          continue;
        }
        uint32_t words[4];
        size_t drawn = (size_t)-1;
        for (int x = 0; x < c.width; x++) {
          size_t i = at + x;
          if (capacity[i] == 0) continue;
          int n = clumps[i], N = sites[capacity[i]];
          if (n == 0 && q[x] <= 0) continue;
          if (i / 2 != drawn) {
            drawn = i / 2;
            philox((uint32_t)drawn, step, c.k0, c.k1, words);
          }
          int word = (i & 1) * 2;
          n = quantile((words[word] + 0.5) / 4294967296.0, n, S[x] * (c.carry + (1 - c.carry) * q[x])) +
              quantile((words[word + 1] + 0.5) / 4294967296.0, N - n, S[x] * q[x]);
          clumps[i] = n;
          cover[i] = capacity[i] * (1.0f / 255) * ((float)n / N);
        }
      }
    }
    clock_gettime(CLOCK_PROCESS_CPUTIME_ID, &to);
    double seconds = (to.tv_sec - from.tv_sec) + (to.tv_nsec - from.tv_nsec) * 1e-9;
    if (seconds < best) best = seconds;
    sum = 0;
    for (size_t i = 0; i < cells; i++) sum += cover[i];
  }
  printf("%.9f %.9f\n", best, sum);
  return 0;
}
