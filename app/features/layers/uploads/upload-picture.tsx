import { useQuery } from '@tanstack/react-query';
import { useMemo } from 'react';
import { getUploadThumbnail, type Upload } from '#contract/uploads.ts';
import { RasterPicture } from '#app/components/raster-picture.tsx';
import { fetchBlob } from '#app/lib/api-client.ts';
import type { MapRaster } from '#app/map/map-raster.ts';
import { cells } from '#app/workers/cells-client.ts';
import { suggestClasses } from '../suggest-classes.ts';

/** Cells of a thumbnail at most. */
const limits = { cells: 256 * 256 };

/** A small picture of what is in a file: classes in the colours they will start with, other values dark to light. */
export function UploadPicture({ upload }: { upload: Upload }) {
  const { teamId, id: uploadId, facts, choices } = upload;
  const picture = useQuery({
    queryKey: ['upload-picture', uploadId, choices.band],
    queryFn: async ({ signal }) =>
      cells.unpack(await fetchBlob(getUploadThumbnail, { params: { teamId, uploadId }, signal }), limits),
    enabled: facts !== null,
    staleTime: Infinity,
    structuralSharing: false,
  }).data;
  const raster = useMemo((): MapRaster | undefined => {
    if (!picture || !facts) return undefined;
    const { values } = picture;
    if (choices.part === 'habitat' && facts.classCounts)
      return { kind: 'classes', values, classes: suggestClasses(facts.classCounts), noData: facts.noData };
    const span = facts.maximum - facts.minimum || 1;
    const bytes = Uint8Array.from(values, (value) =>
      Number.isNaN(value) || value === facts.noData
        ? 0
        : Math.round(255 * Math.min(1, Math.max(0, (value - facts.minimum) / span))),
    );
    return { kind: 'share', values: bytes, name: upload.fileName };
  }, [picture, facts, choices.part, upload.fileName]);
  if (!picture || !raster) return <div className="h-[72px] w-[104px] shrink-0 bg-rule-2" />;
  return (
    <RasterPicture
      raster={raster}
      width={picture.width}
      height={picture.height}
      label={`A small picture of ${upload.fileName}`}
      className="h-auto max-h-[104px] w-[104px] shrink-0 border border-ink object-contain [image-rendering:pixelated]"
    />
  );
}
