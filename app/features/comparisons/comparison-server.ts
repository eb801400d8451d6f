import {
  endComparison,
  getComparison,
  getMapsState,
  putEnsembleMap,
  putMapsState,
  putReplicates,
  type Comparison,
} from '#contract/comparisons.ts';
import type { ReplicateRecord } from '#sim-core/spec/replicate-record.ts';
import { callEndpoint, fetchBlob } from '#app/lib/api-client.ts';
import { fetchReplicates, type EnsembleAddress } from './get-comparison.ts';

/** What a comparison that is being worked on tells the server, and asks of it. */
export interface ComparisonServer {
  /** as it stands now: what a page has read of it may be older */
  comparison(siteId: string, comparisonId: string, signal: AbortSignal): Promise<Comparison>;
  replicates(address: EnsembleAddress, signal: AbortSignal): Promise<ReplicateRecord[]>;
  putReplicates(address: EnsembleAddress, replicates: ReplicateRecord[], signal: AbortSignal): Promise<void>;
  mapsState(address: EnsembleAddress, signal: AbortSignal): Promise<Blob>;
  putMapsState(address: EnsembleAddress, state: Blob, replicates: number, signal: AbortSignal): Promise<void>;
  putMap(
    address: EnsembleAddress,
    map: string,
    packed: Blob,
    replicates: number,
    signal: AbortSignal,
  ): Promise<void>;
  end(siteId: string, comparisonId: string, ending: NonNullable<Comparison['ending']>): Promise<Comparison>;
}

export const comparisonServer: ComparisonServer = {
  comparison: (siteId, comparisonId, signal) =>
    callEndpoint(getComparison, { params: { siteId, comparisonId }, signal }),
  replicates: fetchReplicates,
  putReplicates: async (params, replicates, signal) => {
    await callEndpoint(putReplicates, { params: { ...params }, body: { replicates }, signal });
  },
  mapsState: (params, signal) => fetchBlob(getMapsState, { params: { ...params }, signal }),
  putMapsState: async (params, state, replicates, signal) => {
    await callEndpoint(putMapsState, { params: { ...params }, query: { replicates }, bytes: state, signal });
  },
  putMap: async (params, map, packed, replicates, signal) => {
    await callEndpoint(putEnsembleMap, {
      params: { ...params, map },
      query: { replicates },
      bytes: packed,
      signal,
    });
  },
  end: (siteId, comparisonId, ending) =>
    callEndpoint(endComparison, { params: { siteId, comparisonId }, body: { ending } }),
};
