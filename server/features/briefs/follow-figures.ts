import type { BriefText } from '#contract/brief-content.ts';

/**
 * The words of a brief when its figures change: what still stands as the old figures suggested it becomes what the new
 * ones suggest; what people wrote stays. Order and what is shown stay too.
 */
export function followFigures(text: BriefText, before: BriefText, after: BriefText): BriefText {
  return {
    title: text.title === before.title ? after.title : text.title,
    parts: text.parts.map((part) => {
      const old = before.parts.find((each) => each.part === part.part);
      const fresh = after.parts.find((each) => each.part === part.part);
      return old && fresh && old.words === part.words ? { ...part, words: fresh.words } : part;
    }),
  };
}
