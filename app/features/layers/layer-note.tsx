import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import type { Layer } from '#contract/layers.ts';
import { TextAreaField } from '#app/components/inputs.tsx';
import { ProblemNotice } from '#app/components/notice.tsx';
import { WordButton } from '#app/components/word-button.tsx';
import { changeLayerMutation } from './change-layer.ts';

/** What people should know about a layer, in their own words. */
export function LayerNote(props: { siteId: string; layer: Layer; editable: boolean }) {
  const { siteId, layer, editable } = props;
  const [typed, setTyped] = useState<string>();
  const queryClient = useQueryClient();
  const change = useMutation(changeLayerMutation(queryClient, siteId, layer.id));
  if (typed === undefined)
    return (
      <p className="text-note wrap-anywhere">
        {layer.note && <span className="whitespace-pre-wrap">{layer.note} </span>}
        {editable && (
          <WordButton lined onClick={() => setTyped(layer.note)}>
            {layer.note ? 'change the note' : 'add a note'}
            <span className="sr-only"> to {layer.part}</span>
          </WordButton>
        )}
      </p>
    );
  return (
    <div className="mt-1">
      <TextAreaField
        label={`Note on ${layer.part}`}
        rows={2}
        maxLength={1000}
        value={typed}
        autoFocus
        onChange={(event) => setTyped(event.target.value)}
      />
      <div className="flex gap-x-4">
        <WordButton
          lined
          busy={change.isPending}
          onClick={() => change.mutate({ note: typed.trim() }, { onSuccess: () => setTyped(undefined) })}
        >
          Save the note
        </WordButton>
        <WordButton lined onClick={() => setTyped(undefined)}>
          Leave it
        </WordButton>
      </div>
      {change.error && <ProblemNotice error={change.error} className="mt-1" />}
    </div>
  );
}
