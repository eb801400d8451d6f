import { RunProblem } from '#sim-core/run/run-problem.ts';

/** Most clump sites that a cell may have. */
export const mostSites = 100_000;

/**
 * Clump sites of a cell, N = round(K ν Δx²) and at least 1 where K > 0, by capacity byte; Uint32, 256 values.
 *
 * @throws RunProblem at `rates.clumpsPerSquareMetre` where a cell would have more than 100,000
 */
export function clumpSites(clumpsPerSquareMetre: number, cellSize: number): Uint32Array {
  const full = clumpsPerSquareMetre * cellSize * cellSize;
  if (full > mostSites)
    throw new RunProblem([
      {
        field: 'rates.clumpsPerSquareMetre',
        message:
          `${clumpsPerSquareMetre} clump sites a square metre make ${Math.round(full)} on a cell of ${cellSize} m; ` +
          `at most ${mostSites} can be counted. Use mode mean-field, where chance that fine plays no part, or at most ` +
          `${Number((mostSites / (cellSize * cellSize)).toPrecision(3))} sites a square metre`,
      },
    ]);
  return Uint32Array.from({ length: 256 }, (_, k) =>
    k === 0 ? 0 : Math.max(1, Math.round((k / 255) * full)),
  );
}
