import { gridSchema } from '#contract/grid.ts';
import {
  alignmentSchema,
  habitatClassesSchema,
  layerFactsSchema,
  layerPartSchema,
  storedSourceSchema,
  valueUnitSchema,
  verticalSchema,
  type Layer,
} from '#contract/layers.ts';
import type { LayerRow } from '#server/database/entities/layer.ts';
import { readJson } from '#server/database/json-column.ts';

/** A layer as the contract shows it. */
export function layerReply(row: LayerRow): Layer {
  const { id, hash, bytes, note, fileName, sourceHash, sourceBytes, uploadedAt, uploadedBy } = row;
  return {
    id,
    part: layerPartSchema.parse(row.part),
    year: row.year === 0 ? null : row.year,
    hash,
    bytes,
    grid: readJson(gridSchema, row.grid),
    source: {
      fileName,
      hash: sourceHash,
      bytes: sourceBytes,
      uploadedAt,
      uploadedBy,
      ...readJson(storedSourceSchema, row.source),
    },
    alignment: readJson(alignmentSchema, row.alignment),
    note,
    ...readJson(layerFactsSchema, row.facts),
    unit: valueUnitSchema.parse(row.unit),
    vertical: row.vertical === null ? null : readJson(verticalSchema, row.vertical),
    classes: row.classes === null ? null : readJson(habitatClassesSchema, row.classes),
  };
}
