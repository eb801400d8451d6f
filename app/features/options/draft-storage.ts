import { del, get, keys, set } from 'idb-keyval';
import { z } from 'zod';
import { newWorkId, workSchema, workSetSchema } from '#contract/works.ts';
import type { Option } from '#contract/options.ts';
import { draftOf, isUnsaved, noneSelected, optionDraft, type OptionDraft } from './option-draft.ts';

const keptSchema = z.object({
  revision: z.number().int(),
  works: z.array(workSchema),
  sets: z.array(workSetSchema).default([]),
});
type Kept = z.infer<typeof keptSchema>;
const keyOf = (optionId: string) => `foothold.draft.${optionId}`;

/** The browser may refuse storage, or hold something else there: the drawing then lasts as long as the page. */
function tab(): Storage | undefined {
  try {
    return window.sessionStorage;
  } catch {
    return undefined;
  }
}

/**
 * Where a drawing lies that is too large for the tab's own storage: in the browser's database, under a key that the tab's
 * storage names. Read once a page, before the first drawing is asked for.
 */
const large = new Map<string, { readonly place: string; readonly kept: Kept }>();
const pointer = 'database:';
/** The latest turn of each drawing: what is written slowly must not come after what was kept or forgotten since. */
const turns = new Map<string, number>();
const nextTurn = (optionId: string): number => {
  const turn = (turns.get(optionId) ?? 0) + 1;
  turns.set(optionId, turn);
  return turn;
};
/** Left by tabs that were closed; a day of work is not found again after so long. */
const forgottenAfter = 30 * 24 * 3600 * 1000;

/** Reads the large drawings of this tab, and sweeps what tabs left that are long closed. */
export async function loadLargeDrafts(): Promise<true> {
  const storage = tab();
  const names = storage ? Array.from({ length: storage.length }, (_, i) => storage.key(i) ?? '') : [];
  const places = new Map<string, string>();
  for (const name of names) {
    const text = name.startsWith(keyOf('')) ? storage?.getItem(name) : undefined;
    if (text?.startsWith(pointer)) places.set(name.slice(keyOf('').length), text.slice(pointer.length));
  }
  try {
    for (const [optionId, place] of places) {
      if (large.has(optionId)) continue;
      const kept = keptSchema.safeParse(await get(place)).data;
      if (kept) large.set(optionId, { place, kept });
    }
    const mine = new Set(places.values());
    for (const key of await keys<string>())
      if (!mine.has(key) && Number(key.split('/')[1]) < Date.now() - forgottenAfter) await del(key);
  } catch {
    // No database in this browser: nothing can lie there either.
  }
  return true;
}

function dropLarge(optionId: string): void {
  const held = large.get(optionId);
  large.delete(optionId);
  if (held) void del(held.place).catch(() => undefined);
}

/**
 * Keeps an unsaved drawing in this tab, so that a reload loses nothing; forgets it once it is saved.
 *
 * @returns whether it is kept: where neither storage nor database takes it, it lasts as long as the page
 */
export async function keepDraft(optionId: string, draft: OptionDraft): Promise<boolean> {
  const storage = tab();
  const turn = nextTurn(optionId);
  if (!isUnsaved(draft)) {
    storage?.removeItem(keyOf(optionId));
    dropLarge(optionId);
    return true;
  }
  const { revision, works, sets } = draft;
  try {
    storage?.setItem(keyOf(optionId), JSON.stringify({ revision, works, sets }));
    dropLarge(optionId);
    return storage !== undefined;
  } catch {
    return keepLarge(optionId, { revision, works: [...works], sets: [...sets] }, turn);
  }
}

async function keepLarge(optionId: string, kept: Kept, turn: number): Promise<boolean> {
  const place = large.get(optionId)?.place ?? `draft/${Date.now()}/${newWorkId()}`;
  try {
    await set(place, kept);
    if (turns.get(optionId) !== turn) {
      if (large.get(optionId)?.place !== place) await del(place);
      return true;
    }
    tab()?.setItem(keyOf(optionId), pointer + place);
    large.set(optionId, { place, kept });
    return true;
  } catch {
    return false;
  }
}

export function forgetDraft(optionId: string): void {
  nextTurn(optionId);
  tab()?.removeItem(keyOf(optionId));
  dropLarge(optionId);
}

/**
 * The drawing of an option: what this tab kept of it, else what the server has. A kept drawing stays on the revision
 * that it was made on, so that saving it over somebody else's change is refused and asked about.
 */
export function restoreDraft(option: Option): OptionDraft {
  const saved = draftOf(option);
  const kept = readKept(option.id);
  if (!kept) return saved;
  const restored = {
    ...optionDraft(saved, { type: 'select', ids: noneSelected }),
    works: kept.works,
    sets: kept.sets,
    past: [saved.saved],
  };
  return isUnsaved(restored) ? { ...restored, revision: kept.revision } : saved;
}

function readKept(optionId: string): Kept | undefined {
  try {
    const text = tab()?.getItem(keyOf(optionId));
    if (text?.startsWith(pointer)) return large.get(optionId)?.kept;
    return text ? keptSchema.parse(JSON.parse(text)) : undefined;
  } catch {
    return undefined;
  }
}
