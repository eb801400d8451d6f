import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useState, type ReactNode } from 'react';
import type { Layer } from '#contract/layers.ts';
import { ConfirmDialog } from '#app/components/confirm-dialog.tsx';
import { WordButton } from '#app/components/word-button.tsx';
import { formatBytes, formatDateTime, formatShare } from '#app/lib/formats.ts';
import { deleteLayerMutation } from './change-layer.ts';
import { Histogram } from './histogram.tsx';
import { partLabels } from './part-words.ts';

/** One layer of a site as a note in the margin: the file, who brought it, what its values are. */
export function LayerEntry(props: {
  siteId: string;
  layer: Layer;
  /** shown on the map now */
  shown: boolean;
  onShow: () => void;
  editable: boolean;
  /** what its values mean: a unit, a class table */
  children?: ReactNode;
}) {
  const { layer } = props;
  const { part, noDataShare } = layer;
  return (
    <section className="border-t border-rule py-2.5" aria-label={partLabels[part]}>
      <div className="flex items-baseline justify-between gap-3">
        <h2 className="text-body">{partLabels[part]}</h2>
        <span className="flex shrink-0 gap-3">
          <WordButton pressed={props.shown} onClick={props.onShow}>
            {props.shown ? 'on the map' : 'show'}
          </WordButton>
          {props.editable && <RemoveLayer siteId={props.siteId} layer={layer} />}
        </span>
      </div>
      <p className="text-note wrap-anywhere text-ink-2">
        <span className="font-mono text-ink">{layer.source.fileName}</span>, {formatBytes(layer.source.bytes)}
        , {layer.source.uploadedBy}, {formatDateTime(layer.source.uploadedAt)}
      </p>
      {part !== 'habitat' && <Histogram layer={layer} />}
      <div className="text-note text-ink-2">
        {noDataShare === 0
          ? 'Every cell has a value'
          : `${formatShare(noDataShare)} of the cells have no data${layer.noData === null ? '' : ` (marked ${layer.noData})`}`}
        ; stored as {layer.dataType}.
      </div>
      {props.children !== undefined && <div className="mt-1.5 text-note">{props.children}</div>}
    </section>
  );
}

function RemoveLayer({ siteId, layer }: { siteId: string; layer: Layer }) {
  const [asking, setAsking] = useState(false);
  const queryClient = useQueryClient();
  const remove = useMutation(deleteLayerMutation(queryClient, siteId, layer.id));
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
          `${layer.source.fileName} ${layer.classes ? 'and its class table go' : 'goes'} from the site. ` +
          'Runs already made keep the layer they stand on. To replace it, drop another file; there is no need to remove it first.'
        }
        action={`Remove ${layer.part}`}
        keep="Keep it"
        busy={remove.isPending}
        error={remove.error}
        onConfirm={() => remove.mutate(undefined, { onSuccess: () => setAsking(false) })}
      />
    </>
  );
}
