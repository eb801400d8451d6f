import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import type { Feature, FeatureAttributes } from '#contract/features.ts';
import { TextField } from '#app/components/inputs.tsx';
import { ProblemNotice } from '#app/components/notice.tsx';
import { NumberBlank } from '#app/components/number-blank.tsx';
import { WordButton } from '#app/components/word-button.tsx';
import { changeFeatureMutation, deleteFeatureMutation } from './change-features.ts';

/** Name, radius, strength and halo of one feature. */
export function FeatureEditor(props: { siteId: string; feature: Feature; onClose: () => void }) {
  const { siteId, feature, onClose } = props;
  const { kind, shape } = feature;
  const [draft, setDraft] = useState<FeatureAttributes>({
    name: feature.name,
    strength: feature.strength,
    halo: feature.halo,
    radius: shape.shape === 'disc' ? shape.radius : null,
  });
  const queryClient = useQueryClient();
  const save = useMutation(changeFeatureMutation(queryClient, siteId, feature.id));
  const remove = useMutation(deleteFeatureMutation(queryClient, siteId));
  const set = (change: Partial<FeatureAttributes>) => setDraft({ ...draft, ...change });
  const failed = save.error ?? remove.error;
  return (
    <div className="py-1">
      <TextField
        label="Name"
        value={draft.name}
        maxLength={100}
        onChange={(event) => set({ name: event.target.value })}
      />
      <p className="mt-1 leading-7">
        {draft.radius !== null && (
          <>
            Radius{' '}
            <NumberBlank
              label="Radius, m"
              value={draft.radius}
              least={0.01}
              most={1000}
              characters={5}
              onValue={(radius) => set({ radius })}
            />{' '}
            m
          </>
        )}
        {kind !== 'allowed' && (
          <>
            {draft.radius !== null && ', '}strength{' '}
            <NumberBlank
              label="Strength, 0 to 1"
              value={draft.strength}
              least={0}
              most={1}
              characters={4}
              onValue={(strength) => set({ strength })}
            />
          </>
        )}
        {kind === 'refuge' && draft.radius !== null && (
          <>
            , fading over{' '}
            <NumberBlank
              label="Halo, m"
              value={draft.halo}
              least={0}
              most={1000}
              characters={5}
              onValue={(halo) => set({ halo })}
            />{' '}
            m
          </>
        )}
      </p>
      <div className="flex flex-wrap gap-x-4">
        <WordButton lined busy={save.isPending} onClick={() => save.mutate(draft, { onSuccess: onClose })}>
          Save it
        </WordButton>
        <WordButton lined onClick={onClose}>
          Leave it
        </WordButton>
        <WordButton lined busy={remove.isPending} onClick={() => remove.mutate(feature)}>
          Delete it
        </WordButton>
      </div>
      {failed && <ProblemNotice error={failed} className="mt-1" />}
    </div>
  );
}
