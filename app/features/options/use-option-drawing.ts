import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useEffect, useReducer } from 'react';
import type { Option } from '#contract/options.ts';
import { ProblemError } from '#app/lib/api-client.ts';
import { useWarnBeforeClosing } from '#app/lib/use-warn-before-closing.ts';
import { createOptionMutation, saveOptionMutation } from './change-option.ts';
import { keepDraft, restoreDraft } from './draft-storage.ts';
import { optionsQuery } from './list-options.ts';
import {
  isUnsaved,
  optionDraft,
  stateOf,
  type DraftAction,
  type DraftState,
  type OptionDraft,
} from './option-draft.ts';

export interface OptionDrawing {
  readonly draft: OptionDraft;
  readonly draw: (action: DraftAction) => void;
  readonly unsaved: boolean;
  /** somebody saved this option after the drawing was begun */
  readonly conflict: boolean;
  readonly saving: boolean;
  /** what went wrong while saving, other than a conflict */
  readonly error: unknown;
  /** @returns whether the drawing is saved now */
  readonly save: () => Promise<boolean>;
  readonly rename: (name: string) => Promise<void>;
  /** Saves the drawing as another option and gives this one back as it was saved. */
  readonly keepAsCopy: () => Promise<Option | undefined>;
  readonly takeTheirs: () => void;
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

  useEffect(() => {
    keepDraft(option.id, draft);
  }, [option.id, draft]);
  useWarnBeforeClosing(unsaved);

  const isConflict = saveOption.error instanceof ProblemError && saveOption.error.code === 'conflict';
  const send = async (state: DraftState, name?: string) => {
    try {
      const saved = await saveOption.mutateAsync({
        optionId: option.id,
        revision: draft.revision,
        ...(name === undefined ? bodyOf(state) : { name }),
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
    conflict: behind && unsaved && !saveOption.isPending,
    saving: saveOption.isPending || copyOption.isPending,
    error: isConflict ? copyOption.error : (saveOption.error ?? copyOption.error),
    save: () =>
      send(stateOf(draft)).then(
        () => true,
        () => false,
      ),
    rename: (name) => send(draft.saved, name),
    keepAsCopy: async () => {
      try {
        const copy = await copyOption.mutateAsync({
          name: `${option.name}, my copy`.slice(0, 100),
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
  };
}
