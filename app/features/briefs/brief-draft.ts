import { z } from 'zod';
import {
  briefTextSchema,
  type BriefPart,
  type BriefPartText,
  type BriefText,
} from '#contract/brief-content.ts';
import type { Brief } from '#contract/briefs.ts';

/** What is written on a brief and not saved yet, and the version that it was written on. */
export interface BriefDraft {
  readonly base: number;
  readonly text: BriefText;
}

export const draftOf = ({ version, text }: Pick<Brief, 'version' | 'text'>): BriefDraft => ({
  base: version,
  text,
});
export const sameText = (a: BriefText, b: BriefText): boolean => JSON.stringify(a) === JSON.stringify(b);

export const withTitle = (text: BriefText, title: string): BriefText => ({ ...text, title });
export const withPart = (
  text: BriefText,
  part: BriefPart,
  change: Partial<Omit<BriefPartText, 'part'>>,
): BriefText => ({
  ...text,
  parts: text.parts.map((each) => (each.part === part ? { ...each, ...change } : each)),
});

/** The part one place further up (−1) or down (1); at the end of the page it stays. */
export function movePart(text: BriefText, part: BriefPart, by: -1 | 1): BriefText {
  const from = text.parts.findIndex((each) => each.part === part);
  const to = from + by;
  if (to < 0 || to >= text.parts.length) return text;
  const parts = [...text.parts];
  [parts[from], parts[to]] = [parts[to], parts[from]];
  return { ...text, parts };
}

/** What keeps a draft from being saved, in words; undefined where nothing does. */
export function draftProblem(text: BriefText): string | undefined {
  const parsed = briefTextSchema.safeParse(text);
  if (parsed.success) return undefined;
  const { path, message } = parsed.error.issues[0];
  const place = path[0] === 'title' ? 'The title' : text.parts[Number(path[1])]?.heading || 'A heading';
  return `${place}: ${message}`;
}

// A draft in the middle of its writing may break rules that a saved one keeps, such as having a title.
const keptSchema = z.object({
  base: z.number().int(),
  text: z.object({
    title: z.string(),
    parts: z.array(
      z.object({
        part: briefTextSchema.shape.parts.element.shape.part,
        heading: z.string(),
        words: z.string(),
        shown: z.boolean(),
      }),
    ),
  }),
});
const keyOf = (briefId: string) => `foothold.brief.${briefId}`;

/** The browser may refuse storage: the draft then lasts as long as the page. */
function store(): Storage | undefined {
  try {
    return window.localStorage;
  } catch {
    return undefined;
  }
}

/** Keeps a draft in this browser, so that a reload or a closed tab loses nothing; undefined forgets it. */
export function keepBriefDraft(briefId: string, draft: BriefDraft | undefined): void {
  try {
    if (draft) store()?.setItem(keyOf(briefId), JSON.stringify(draft));
    else store()?.removeItem(keyOf(briefId));
  } catch {
    // Storage is full: nothing else depends on it.
  }
}

/** The draft that this browser kept of a brief. */
export function keptBriefDraft(briefId: string): BriefDraft | undefined {
  try {
    const text = store()?.getItem(keyOf(briefId));
    return text ? keptSchema.parse(JSON.parse(text)) : undefined;
  } catch {
    return undefined;
  }
}
