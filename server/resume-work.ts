import { resumeUploads } from './features/sites/uploads/upload.service.ts';
import { resumeGridChanges } from './features/sites/working-grid/grid-change.service.ts';
import { settleBriefMail } from './features/briefs/brief-mail.service.ts';
import type { Services } from './services.ts';

/** Takes up again all long work that an earlier process left unfinished. For the start. */
export async function resumeWork(services: Services): Promise<void> {
  await resumeUploads(services);
  await resumeGridChanges(services);
  await settleBriefMail(services);
}
