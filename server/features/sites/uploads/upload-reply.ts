import { layerFactsSchema } from '#contract/layers.ts';
import {
  rasterDescriptionSchema,
  uploadChoicesSchema,
  uploadSchema,
  uploadStates,
  type Upload,
} from '#contract/uploads.ts';
import { z } from 'zod';
import { gridOf } from '#server/database/site-grid.ts';
import type { UploadRow } from '#server/database/entities/upload.ts';
import { readJson } from '#server/database/json-column.ts';
import type { Manager } from '#server/database/manager.ts';
import type { Services } from '#server/services.ts';
import { findSite } from '../site.repository.ts';
import { planUpload, type SurveyedUpload, type UploadPlan } from './plan-upload.ts';

const statesSchema = z.enum(uploadStates);
const problemColumn = uploadSchema.shape.problem.unwrap();

/** What a row knows of its raster, once it has been read. */
export function surveyed(row: UploadRow): SurveyedUpload | null {
  const { description, facts, band, choices } = row;
  if (description === null || facts === null || band === null) return null;
  return {
    description: readJson(rasterDescriptionSchema, description),
    facts: readJson(layerFactsSchema, facts),
    band,
    choices: readJson(uploadChoicesSchema, choices),
  };
}

const unknown: UploadPlan = {
  plan: null,
  suggestedGrid: null,
  outline: null,
  decisions: [],
  heights: null,
  problem: null,
};

/** What an upload comes to on the grid that its site has now; null until it is read. */
export async function planOf(manager: Manager, row: UploadRow): Promise<UploadPlan | null> {
  const upload = surveyed(row);
  if (!upload) return null;
  const site = row.siteId === null ? null : await findSite(manager, row.siteId);
  return planUpload(upload, site && gridOf(site));
}

/** An upload as the contract shows it. */
export async function uploadReply(
  { background }: Services,
  manager: Manager,
  row: UploadRow,
): Promise<Upload> {
  const { id, teamId, siteId, fileName, hash, bytes, uploadedAt, uploadedBy, layerId, choices } = row;
  const busy = row.state === 'reading' || row.state === 'aligning';
  const progress = (busy && background.progressOf(id)) || null;
  const settled = row.state === 'done' || row.state === 'refused';
  const { problem, ...plan } = (settled ? null : await planOf(manager, row)) ?? unknown;
  return {
    id,
    teamId,
    siteId,
    fileName,
    hash,
    bytes,
    uploadedAt,
    uploadedBy,
    state: busy && !progress ? 'waiting' : statesSchema.parse(row.state),
    progress,
    description: row.description === null ? null : readJson(rasterDescriptionSchema, row.description),
    facts: row.facts === null ? null : readJson(layerFactsSchema, row.facts),
    choices: readJson(uploadChoicesSchema, choices),
    ...plan,
    problem: row.problem === null ? problem : readJson(problemColumn, row.problem),
    layerId,
  };
}
