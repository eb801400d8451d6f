import { queryOptions } from '@tanstack/react-query';
import { getClosing } from '#contract/runs.ts';
import { maximumCells } from '#sim-core/spec/limits.ts';
import { fetchBlob } from '#app/lib/api-client.ts';
import { cells } from '#app/workers/cells-client.ts';

/** The closing year of every cell of a run that reached its horizon. */
export const closingQuery = (runId: string) =>
  queryOptions({
    queryKey: ['run-closing', runId],
    queryFn: async ({ signal }) => {
      const packed = await fetchBlob(getClosing, { params: { runId }, signal });
      const { values } = await cells.unpack(packed, { cells: maximumCells });
      if (!(values instanceof Int16Array))
        throw new Error('The map of closing years holds other numbers than years; run it again.');
      return values;
    },
    staleTime: Infinity,
    gcTime: 60_000,
    structuralSharing: false,
  });
