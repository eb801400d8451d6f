import { z } from 'zod';

const amountSchema = z.discriminatedUnion('by', [
  z.object({ by: z.literal('count'), count: z.number() }),
  z.object({ by: z.literal('budget'), budget: z.number(), each: z.number() }),
]);
const keptSchema = z.object({
  pen: z.object({ by: z.enum(['count', 'budget']), count: z.string(), budget: z.string() }),
  asked: z.object({
    mound: z.object({ radius: z.number(), strength: z.number(), halo: z.number(), clumps: z.number() }),
    year: z.number(),
    amount: amountSchema,
  }),
  /** how many of them are taken; all unless said */
  wanted: z.number().optional(),
  /** absent while it is worked out */
  result: z
    .object({
      footholds: z.array(z.object({ x: z.number(), y: z.number(), gain: z.number() })),
      knee: z.number().optional(),
    })
    .optional(),
});
/** A suggestion that was asked for and neither taken nor dismissed yet, with what it came to once it is there. */
export type KeptSuggestion = z.infer<typeof keptSchema>;

const keyOf = (optionId: string) => `foothold.suggestion.${optionId}`;

/** Keeps it in this tab, as an unsaved drawing is kept; forgets it where there is none any more. */
export function keepSuggestion(optionId: string, kept: KeptSuggestion | undefined): void {
  try {
    if (kept) window.sessionStorage.setItem(keyOf(optionId), JSON.stringify(kept));
    else window.sessionStorage.removeItem(keyOf(optionId));
  } catch {
    // Storage is refused or full: it then lasts as long as the page, and can be asked for again.
  }
}

export function keptSuggestion(optionId: string): KeptSuggestion | undefined {
  try {
    const text = window.sessionStorage.getItem(keyOf(optionId));
    return text ? keptSchema.parse(JSON.parse(text)) : undefined;
  } catch {
    return undefined;
  }
}
