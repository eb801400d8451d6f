import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useReducer } from 'react';
import type { Option } from '#contract/options.ts';
import { copyName } from '#contract/work-titles.ts';
import { ProblemError } from '#app/lib/api-client.ts';
import { useWarnBeforeClosing } from '#app/lib/use-warn-before-closing.ts';
import { createOptionMutation, saveOptionMutation } from './change-option.ts';
import { restoreDraft } from './draft-storage.ts';
import { optionsQuery } from './list-options.ts';
import {
  isUnsaved,
  optionDraft,
  stateOf,
  type DraftAction,
  type DraftState,
  type OptionDraft,
} from './option-draft.ts';
import { useKeptDraft } from './use-kept-draft.ts';

/** What an option is called, what is noted of it, and whether it is put away. */
export type OptionWords = { name?: string; note?: string; archived?: boolean };

export interface OptionDrawing {
  readonly draft: OptionDraft;
  readonly draw: (action: DraftAction) => void;
  readonly unsaved: boolean;
  /** a reload would lose nothing of it; false where the browser cannot keep it */
  readonly kept: boolean;
  /** somebody saved this option after the drawing was begun */
  readonly conflict: boolean;
  readonly saving: boolean;
  /** what went wrong while saving, other than a conflict */
  readonly error: unknown;
  /** @returns whether the drawing is saved now */
  readonly save: () => Promise<boolean>;
  /** Changes what is said of the option, and leaves the drawing as it is. */
  readonly describe: (words: OptionWords) => Promise<void>;
  /** Saves the drawing as another option and gives this one back as it was saved. */
  readonly keepAsCopy: () => Promise<Option | undefined>;
  readonly takeTheirs: () => void;
  /** Goes on with both put together, on what they saved. */
  readonly merge: (state: DraftState) => void;
}

/** What the contract takes: lists of its own. */
const bodyOf = ({ works, sets }: DraftState) => ({ works: [...works], sets: [...sets] });

/** Drawing on one option; the component that uses it must be keyed by the option. */
export function useOptionDrawing(option: Option): OptionDrawing {
  const queryClient = useQueryClient();
  const [draft, draw] = useReducer(optionDraft, option, restoreDraft);
  const saveOption = useMutation(saveOptionMutation(queryClient, option.siteId));
  const copyOption = useMutation(createOptionMutation(queryClient, option.siteId));
  const unsaved = isUnsaved(draft);
  const behind = option.revision > draft.revision;
  // Where nothing is drawn, what others saved is simply what there is now.
  if (behind && !unsaved && !saveOption.isPending) draw({ type: 'take', option });

  const kept = useKeptDraft(option.id, draft);
  useWarnBeforeClosing(unsaved);

  const isConflict = saveOption.error instanceof ProblemError && saveOption.error.code === 'conflict';
  const send = async (state: DraftState, words?: OptionWords) => {
    try {
      const saved = await saveOption.mutateAsync({
        optionId: option.id,
        revision: draft.revision,
        ...(words ?? bodyOf(state)),
      });
      draw({ type: 'saved', revision: saved.revision, state });
    } catch (error) {
      // The list then brings what the others saved, and with it who and when.
      await queryClient.invalidateQueries({ queryKey: optionsQuery(option.siteId).queryKey });
      throw error;
    }
  };
  return {
    draft,
    draw,
    unsaved,
    kept,
    conflict: behind && unsaved && !saveOption.isPending,
    saving: saveOption.isPending || copyOption.isPending,
    error: isConflict ? copyOption.error : (saveOption.error ?? copyOption.error),
    save: () =>
      send(stateOf(draft)).then(
        () => true,
        () => false,
      ),
    describe: (words) => send(draft.saved, words),
    keepAsCopy: async () => {
      const listed = queryClient.getQueryData(optionsQuery(option.siteId).queryKey) ?? [];
      const others = listed.map(({ name }) => name);
      try {
        const copy = await copyOption.mutateAsync({
          name: copyName(option.name, others),
          ...bodyOf(draft),
        });
        draw({ type: 'take', option });
        return copy;
      } catch {
        return undefined;
      }
    },
    takeTheirs: () => {
      saveOption.reset();
      draw({ type: 'take', option });
    },
    merge: (state) => {
      saveOption.reset();
      draw({ type: 'merge', option, state });
    },
  };
}
