import { mutationOptions, type QueryClient } from '@tanstack/react-query';
import {
  type Feature,
  type FeatureAttributes,
  type FeatureImportForm,
  type FeatureImportReply,
} from '#contract/features.ts';
import { changeFeature, deleteFeature, deleteFeatureImport, importFeatures } from '#contract/ground.ts';
import type { Site } from '#contract/sites.ts';
import { callEndpoint } from '#app/lib/api-client.ts';
import { keepSite, siteKey } from '#app/lib/site-cache.ts';

/** Reads points and areas from a file, to look at or to keep. @throws ProblemError what is wrong with the file */
export const importMutation = (queryClient: QueryClient, siteId: string) =>
  mutationOptions({
    mutationFn: ({ file, ...form }: FeatureImportForm & { file: File }): Promise<FeatureImportReply> =>
      callEndpoint(importFeatures, { params: { siteId }, body: form, file }),
    onSuccess: async ({ importId }) => {
      if (importId !== null) await queryClient.invalidateQueries({ queryKey: siteKey(siteId) });
    },
  });

const kept = (queryClient: QueryClient) => ({ onSuccess: (site: Site) => keepSite(queryClient, site) });

export const changeFeatureMutation = (queryClient: QueryClient, siteId: string, featureId: string) =>
  mutationOptions({
    mutationFn: (change: Partial<FeatureAttributes>) =>
      callEndpoint(changeFeature, { params: { siteId, featureId }, body: change }),
    ...kept(queryClient),
  });

export const deleteFeatureMutation = (queryClient: QueryClient, siteId: string) =>
  mutationOptions({
    mutationFn: ({ id: featureId }: Pick<Feature, 'id'>) =>
      callEndpoint(deleteFeature, { params: { siteId, featureId } }),
    ...kept(queryClient),
  });

export const deleteImportMutation = (queryClient: QueryClient, siteId: string) =>
  mutationOptions({
    mutationFn: (importId: string) => callEndpoint(deleteFeatureImport, { params: { siteId, importId } }),
    ...kept(queryClient),
  });
