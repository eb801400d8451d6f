"""The step of the model in NumPy and SciPy: what a modeller would write in a notebook, whole arrays at a time.

It is written for the reader, as one would who knows NumPy well: a formula a line, the neighbourhood separable along the
two axes with SciPy's own filter, the constant layers prepared once outside the step, expm1 where it belongs, NumPy's own
binomial draws in counts mode. It is not slowed down, and not tuned by hand with buffers, blocks or a compiler: whoever does
that has left the notebook, and `yardstick.c` stands for them. The precision is an argument: float64 is what NumPy takes
unless told otherwise; float32, what one may turn to when it is slow.

Reads a case as `case-file.ts` writes it and prints: seconds of the processor in the fastest of at most three rounds, and
the sum of cover after it.
"""

import sys
import time

import numpy as np
from scipy.ndimage import correlate1d

with open(sys.argv[1], "rb") as file:
    width, height, radius, counts, steps, rounds = np.fromfile(file, "<i4", 6)
    np.fromfile(file, "<u4", 2)
    (carry, recruits, years, background, drought, loss_width, tolerance, exposure_shift, refuge_shift,
     neighbour_shift, refuge_growth, drought_index) = np.fromfile(file, "<f4", 12)
    half = np.fromfile(file, "<f4", radius + 1)
    sites = np.fromfile(file, "<u4", 256)
    cells = int(width) * int(height)
    layers = [np.fromfile(file, "u1", cells).reshape(height, width) for _ in range(4)]
    start = np.fromfile(file, "<u2" if counts else "<f4", cells).reshape(height, width)

real = np.dtype(sys.argv[2]).type
K, g, E, M = (layer.astype(real) / real(255) for layer in layers)
N = sites[layers[0]].astype(np.int64)
taps = np.concatenate([half[:0:-1], half]).astype(real)
draw = np.random.default_rng(1)


def step(C, n):
    heard = correlate1d(correlate1d(C, taps, axis=1, mode="reflect"), taps, axis=0, mode="reflect")
    phi = heard / K
    phi1 = np.minimum(phi, 1)
    q = -np.expm1(-recruits * g * (1 + refuge_growth * M) * phi)
    critical = tolerance + exposure_shift * E - refuge_shift * M - neighbour_shift * phi1
    hazard = background + drought / (1 + np.exp((drought_index - critical) / loss_width))
    S = np.exp(-hazard * years)
    if not counts:
        return np.minimum(S * (carry * C + (K - carry * C) * q), K), n
    n = draw.binomial(n, S * (carry + (1 - carry) * q)) + draw.binomial(N - n, S * q)
    return K * (n / N).astype(real), n


best = np.inf
for _ in range(min(rounds, 3)):
    n = start.astype(np.int64) if counts else None
    C = K * (n / N).astype(real) if counts else start.astype(real)
    begin = time.process_time()
    for _ in range(steps):
        C, n = step(C, n)
    best = min(best, time.process_time() - begin)
print(best, C.sum(dtype=np.float64))
