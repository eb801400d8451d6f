import type { Layer, ResamplingMethod } from '#contract/layers.ts';
import { formatBytes, formatCounted, formatDateTime, formatShare } from '#app/lib/formats.ts';

/** Where a layer comes from: file, size, who, when. */
export const sourceInWords = ({ source }: Pick<Layer, 'source'>): string =>
  `${formatBytes(source.bytes)}, ${source.uploadedBy}, ${formatDateTime(source.uploadedAt)}`;

const carried: Record<ResamplingMethod, string> = {
  copy: 'cell by cell',
  nearest: 'by the nearest cell',
  bilinear: 'by the four cells around',
  'area-weighted': 'by the area of the cells beneath',
  majority: 'by the commonest class beneath',
};

/** What was done to bring the file onto the grid. */
export function alignmentInWords({ source, alignment }: Pick<Layer, 'source' | 'alignment'>): string {
  const { method, reprojectedFrom, cropped, padded } = alignment;
  const band = source.bands > 1 ? `Band ${source.band} of ${source.bands}. ` : '';
  const untouched = method === 'copy' && cropped === 0 && padded === 0;
  if (untouched) return `${band}Taken cell by cell: it lies on the cells of the site.`;
  const from = reprojectedFrom === null ? '' : ` from ${reprojectedFrom}`;
  const lost = [
    cropped > 0 && `${formatCounted(cropped, 'cell')} outside the site left out`,
    padded > 0 && `${formatCounted(padded, 'cell')} of the site not reached`,
  ].filter((words) => words !== false);
  return `${band}Brought onto the grid${from} ${carried[method]}${lost.length > 0 ? `; ${lost.join(', ')}` : ''}.`;
}

/** How much of the layer is there, and how it is stored. */
export const noDataInWords = ({
  noDataShare,
  noData,
  dataType,
  alignment,
}: Pick<Layer, 'noDataShare' | 'noData' | 'dataType' | 'alignment'>) =>
  `${
    noDataShare === 0
      ? alignment.padded > 0
        ? 'Every cell that the file reaches has a value'
        : 'Every cell has a value'
      : `${formatShare(noDataShare)} of the cells have no data${noData === null ? '' : ` (marked ${noData})`}`
  }; stored as ${dataType}.`;
