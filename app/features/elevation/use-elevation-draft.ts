import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { tidalDatumsSchema } from '#contract/layers.ts';
import type { Site } from '#contract/sites.ts';
import { sayDone } from '#app/components/toast.tsx';
import {
  editElevation,
  startEditing,
  type ElevationDraft,
  type ElevationEditing,
  type ElevationEvent,
} from './curve-draft.ts';
import { setElevationMutation } from './set-elevation.ts';

export interface ElevationDrafting {
  draft: ElevationDraft;
  /** changed by hand and not saved */
  dirty: boolean;
  /** what keeps it from being saved, in words */
  wrong: string | undefined;
  canUndo: boolean;
  canRedo: boolean;
  saving: boolean;
  error: Error | null;
  tell: (event: ElevationEvent) => void;
  save: () => void;
  revert: () => void;
}

/** Curves and levels of the tide of a site while they are edited; a refetch keeps the draft. */
export function useElevationDraft(
  site: Pick<Site, 'id' | 'elevationCurves' | 'tidalDatums'>,
): ElevationDrafting {
  const { id, elevationCurves, tidalDatums } = site;
  const [editing, setEditing] = useState<ElevationEditing>();
  const queryClient = useQueryClient();
  const save = useMutation(setElevationMutation(queryClient, id));
  const now = editing ?? startEditing({ elevationCurves, tidalDatums });
  const named = tidalDatumsSchema.safeParse(now.draft.tidalDatums);
  return {
    draft: now.draft,
    dirty: editing !== undefined && editing.past.length > 0,
    wrong: named.success ? undefined : 'Give each level of the tide a name.',
    canUndo: now.past.length > 0,
    canRedo: now.future.length > 0,
    saving: save.isPending,
    error: save.error,
    tell: (event) =>
      setEditing((before) => editElevation(before ?? startEditing({ elevationCurves, tidalDatums }), event)),
    save: () => {
      if (!named.success) return;
      save.mutate(now.draft, {
        onSuccess: () => {
          setEditing(undefined);
          sayDone('Elevation curves saved');
        },
      });
    },
    revert: () => {
      setEditing(undefined);
      save.reset();
    },
  };
}
