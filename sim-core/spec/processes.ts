import { z } from 'zod';
import { fragmentParameters, grazerParameters } from './process-parameters.ts';
import { rateSchema } from './rate-schema.ts';

/** What goes on beside spread and loss: each process is off unless it stands here, `{}` being on at its defaults. */
export const processesSchema = z.strictObject({
  /** animals that eat the plant, held down by predators except in drought */
  grazers: rateSchema(grazerParameters).optional(),
  /** pieces that break off and take root elsewhere; counts mode alone */
  fragments: rateSchema(fragmentParameters).optional(),
});
export type Processes = z.infer<typeof processesSchema>;
