import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import type { LayerHistoryEntry, LayerPart } from '#contract/layers.ts';
import { Dialog } from '#app/components/dialog.tsx';
import { LoadingLines } from '#app/components/loading-lines.tsx';
import { ProblemNotice } from '#app/components/notice.tsx';
import { RasterHashes } from '#app/components/raster-hashes.tsx';
import { sayDone } from '#app/components/toast.tsx';
import { WordButton } from '#app/components/word-button.tsx';
import { formatCounted, formatDateTime } from '#app/lib/formats.ts';
import { deleteLayerMutation, layerHistoryQuery, putBackMutation } from './change-layer.ts';
import { alignmentInWords, sourceInWords } from './layer-words.ts';

/** The layers that play or have played a part: who brought them, when, and a way back. */
export function LayerHistory(props: {
  siteId: string;
  part: LayerPart;
  editable: boolean;
  onClose: () => void;
}) {
  const { siteId, part, editable } = props;
  const history = useQuery(layerHistoryQuery(siteId, part));
  return (
    <Dialog
      open
      wide
      onOpenChange={props.onClose}
      title={`History of ${part}`}
      description="Newest first. Runs keep the layer that they were started on, whatever stands now."
    >
      {history.error && <ProblemNotice error={history.error} className="mt-3" />}
      {history.isPending && <LoadingLines label="Fetching the history" lines={3} />}
      <ul className="mt-3">
        {history.data?.map((entry) => (
          <li key={entry.layer.id} className="border-t border-rule py-2 text-note">
            <Entry {...{ siteId, entry, editable }} onBack={props.onClose} />
          </li>
        ))}
      </ul>
      {history.data?.length === 0 && <p className="text-note text-ink-2">No layer has played it yet.</p>}
      <div className="mt-3">
        <WordButton lined onClick={props.onClose}>
          Close
        </WordButton>
      </div>
    </Dialog>
  );
}

function Entry(props: { siteId: string; entry: LayerHistoryEntry; editable: boolean; onBack: () => void }) {
  const { siteId, entry } = props;
  const { layer, replacedAt, runs } = entry;
  const queryClient = useQueryClient();
  const back = useMutation(putBackMutation(queryClient, siteId));
  const remove = useMutation(deleteLayerMutation(queryClient, siteId, layer.id));
  const name = layer.source.fileName;
  const failed = back.error ?? remove.error;
  return (
    <>
      <p className="wrap-anywhere">
        {layer.year !== null && <b>{layer.year}: </b>}
        <b className="font-mono">{name}</b>, {sourceInWords(layer)}.{' '}
        <b>{replacedAt === null ? 'Stands now.' : `Stood until ${formatDateTime(replacedAt)}.`}</b>
        <RasterHashes hash={layer.hash} sourceHash={layer.source.hash} />
      </p>
      <p className="text-ink-2">
        {alignmentInWords(layer)}{' '}
        {runs === 0 ? 'No run stands on it.' : `${formatCounted(runs, 'run')} on it.`}
        {layer.note && ` ${layer.note}`}
      </p>
      {props.editable && replacedAt !== null && (
        <div className="flex flex-wrap gap-x-4">
          <WordButton
            lined
            busy={back.isPending}
            onClick={() =>
              back.mutate(layer.id, {
                onSuccess: () => {
                  sayDone(`${name} is put back`);
                  props.onBack();
                },
              })
            }
          >
            Put back<span className="sr-only"> {name}</span>
          </WordButton>
          {runs === 0 && (
            <WordButton lined busy={remove.isPending} onClick={() => remove.mutate()}>
              Delete for good<span className="sr-only"> {name}</span>
            </WordButton>
          )}
        </div>
      )}
      {failed && <ProblemNotice error={failed} className="mt-1" />}
    </>
  );
}
