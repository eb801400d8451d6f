import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import type { LayerDependents } from '#contract/ground.ts';
import type { Layer } from '#contract/layers.ts';
import { ConfirmDialog } from '#app/components/confirm-dialog.tsx';
import { WordButton } from '#app/components/word-button.tsx';
import { formatCounted } from '#app/lib/formats.ts';
import { deleteLayerMutation, dependentsQuery } from './change-layer.ts';

/** Takes a layer off the site, after saying what depends on it. */
export function RemoveLayer({ siteId, layer }: { siteId: string; layer: Layer }) {
  const [asking, setAsking] = useState(false);
  const queryClient = useQueryClient();
  const remove = useMutation(deleteLayerMutation(queryClient, siteId, layer.id));
  const dependents = useQuery({ ...dependentsQuery(siteId, layer.id), enabled: asking });
  return (
    <>
      <WordButton onClick={() => setAsking(true)}>
        remove<span className="sr-only"> {layer.part}</span>
      </WordButton>
      <ConfirmDialog
        open={asking}
        onOpenChange={(open) => {
          setAsking(open);
          remove.reset();
        }}
        title={`Remove ${layer.part} from this site?`}
        description={
          `${layer.source.fileName} goes from the site and stays in the history of ${layer.part}, from where it can be put back. ` +
          dependentsInWords(dependents.data, dependents.error !== null)
        }
        action={`Remove ${layer.part}`}
        keep="Keep it"
        busy={remove.isPending || dependents.isPending}
        error={remove.error}
        onConfirm={() => remove.mutate(undefined, { onSuccess: () => setAsking(false) })}
      />
    </>
  );
}

/** What would be felt if the layer went. */
export function dependentsInWords(dependents: LayerDependents | undefined, unknown: boolean): string {
  if (unknown) return 'What depends on it could not be asked.';
  if (!dependents) return 'Looking for what depends on it …';
  const { runs, runNames, comparisons, consequences } = dependents;
  const named = runNames.slice(0, 3).join(', ');
  const more = runs > runNames.slice(0, 3).length ? ' and others' : '';
  const stand =
    runs === 0
      ? 'No run stands on it.'
      : `${formatCounted(runs, 'run')} ${runs === 1 ? 'stands' : 'stand'} on it (${named}${more}) and ${runs === 1 ? 'keeps' : 'keep'} it.`;
  const compared =
    comparisons === 0
      ? []
      : [`${formatCounted(comparisons, 'comparison')} ${comparisons === 1 ? 'stands' : 'stand'} on it too.`];
  return [...consequences, stand, ...compared].join(' ');
}
