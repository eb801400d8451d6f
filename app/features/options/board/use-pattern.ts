import { keepPreviousData, useQuery } from '@tanstack/react-query';
import type { LaidPoints } from '#sim-core/plan/pattern.ts';
import type { PatternRequest } from '#app/workers/quick-look-desk.ts';

/** Lays patterns on one ground. */
export interface PatternLayer {
  /** another one for another ground */
  readonly key: number;
  readonly lay: (request: PatternRequest) => Promise<LaidPoints>;
}

/** The points of a pattern as it is described now, laid off the page; the last ones while new ones are on their way. */
export function usePattern(layer: PatternLayer | undefined, request: PatternRequest | undefined) {
  return useQuery({
    queryKey: ['pattern', layer?.key, request],
    queryFn: () => (layer && request ? layer.lay(request) : Promise.reject(new Error('Nothing to lay'))),
    enabled: layer !== undefined && request !== undefined,
    placeholderData: keepPreviousData,
    staleTime: Infinity,
    gcTime: 30_000,
    retry: false,
  });
}
