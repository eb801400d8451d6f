import { encodeCellValues } from '#rasters/cells/cell-values.ts';
import { surveyBand } from '#rasters/describe/survey-band.ts';
import { withFileSource } from '../files/file-source.ts';
import type { SurveyTask, TaskResults } from './raster-tasks.ts';
import { writeHashed } from './read-layer.ts';

/**
 * Says what an uploaded file is and what its band holds, and leaves a small picture of it at `thumbnailPath`.
 * @throws RasterError what is wrong with the file
 */
export async function surveyUpload(
  { path, band, thumbnailPath }: SurveyTask,
  onProgress: (share: number) => void,
): Promise<TaskResults['survey']> {
  const survey = await withFileSource(path, (source) =>
    surveyBand(source, { band: band ?? undefined, onProgress }),
  );
  const { description, thumbnail } = survey;
  const { dataType, noData, index } = survey.band;
  const { noDataShare, minimum, maximum, histogram, classCounts } = survey.summary;
  return {
    description,
    band: index,
    facts: {
      dataType,
      crsName: description.crs.name,
      noData,
      noDataShare,
      minimum,
      maximum,
      histogram,
      classCounts,
    },
    thumbnail: await writeHashed(thumbnailPath, encodeCellValues(thumbnail)),
  };
}
