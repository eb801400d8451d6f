import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { useEffect, useRef, useSyncExternalStore } from 'react';
import type { Layer } from '#contract/layers.ts';
import type { Upload } from '#contract/uploads.ts';
import type { Grid } from '#sim-core/grid/grid.ts';
import { Button } from '#app/components/button.tsx';
import { ProblemNotice } from '#app/components/notice.tsx';
import { Progress } from '#app/components/progress.tsx';
import { sayDone } from '#app/components/toast.tsx';
import { WordButton } from '#app/components/word-button.tsx';
import { formatBytes, formatCounted } from '#app/lib/formats.ts';
import { siteKey } from '#app/lib/site-cache.ts';
import { useWarnBeforeClosing } from '#app/lib/use-warn-before-closing.ts';
import { clearUploads } from './plan-words.ts';
import type { Sending } from './sending-queue.ts';
import type { SendingStore } from './sending-store.ts';
import { UploadRow } from './upload-row.tsx';
import { dismiss, keepUpload, uploadDeeds, uploadsQuery } from './uploads-query.ts';

/** Files on their way to a site: sent, read, decided about, placed. */
export function UploadPanel(props: {
  teamId: string;
  siteId: string;
  grid: Grid;
  /** what plays its part now */
  layers: readonly Layer[];
  store: SendingStore;
  /** whether placing is the action of the page that matters now */
  primary: boolean;
}) {
  const { teamId, siteId, grid, layers, store } = props;
  const sendings = useSyncExternalStore(store.subscribe, store.snapshot);
  const uploads = useQuery(uploadsQuery(teamId, siteId));
  useWarnBeforeClosing(sendings.some(({ state }) => state.kind !== 'refused'));
  useTakingDone(siteId, uploads.data);
  const clear = clearUploads(uploads.data ?? []);
  if (sendings.length === 0 && !uploads.data?.length && !uploads.error) return null;
  return (
    <div className="mb-3">
      {uploads.error && <ProblemNotice error={uploads.error} title="The uploads could not be listed." />}
      {clear.length > 1 && <PlaceAll uploads={clear} primary={props.primary} />}
      <ul>
        {uploads.data?.map((upload) => (
          <li key={upload.id} className="border-t border-rule-2 py-2">
            <UploadRow upload={upload} grid={grid} layers={layers} />
          </li>
        ))}
        {sendings.map((sending) => (
          <li key={sending.key} className="border-t border-rule-2 py-2">
            <SendingRow sending={sending} onRemove={() => store.remove(sending.key)} />
          </li>
        ))}
      </ul>
    </div>
  );
}

/** Several files that nobody has to look at again are placed together. */
function PlaceAll({ uploads, primary }: { uploads: readonly Upload[]; primary: boolean }) {
  const queryClient = useQueryClient();
  const place = useMutation({
    mutationFn: async () => {
      for (const upload of uploads) keepUpload(queryClient, await uploadDeeds.place(upload));
    },
  });
  return (
    <div className="pb-2">
      <Button kind={primary ? 'primary' : 'quiet'} busy={place.isPending} onClick={() => place.mutate()}>
        Place {formatCounted(uploads.length, 'file')}
      </Button>
      <p className="mt-1 text-note text-ink-2">
        {uploads.map(({ fileName, choices }) => `${fileName} as ${choices.part}`).join(', ')}: they lie on the
        site’s cells, so nothing else is to be decided.
      </p>
      {place.error && <ProblemNotice error={place.error} className="mt-1" />}
    </div>
  );
}

export function SendingRow({ sending, onRemove }: { sending: Sending; onRemove: () => void }) {
  const { file, state } = sending;
  const off = (words: string) => (
    <WordButton lined onClick={onRemove}>
      {words}
      <span className="sr-only"> {file.name}</span>
    </WordButton>
  );
  if (state.kind === 'refused')
    return (
      <ProblemNotice error={state.error} title={`${file.name} was refused.`}>
        {off('Take it off the list')}
      </ProblemNotice>
    );
  const sent = state.kind === 'sending' ? state.progress.sent : 0;
  return (
    <>
      <Progress
        label={state.kind === 'sending' ? `Sending ${file.name}` : `${file.name}: waiting to be sent`}
        done={sent}
        of={file.size}
        note={`${formatBytes(sent)} of ${formatBytes(file.size)}`}
      />
      {off('Cancel')}
    </>
  );
}

/** What became a layer is shown among the layers, so it leaves the list. */
function useTakingDone(siteId: string, uploads: readonly Upload[] | undefined): void {
  const queryClient = useQueryClient();
  const taken = useRef(new Set<string>());
  useEffect(() => {
    for (const upload of uploads ?? []) {
      if (upload.state !== 'done' || taken.current.has(upload.id)) continue;
      taken.current.add(upload.id);
      sayDone(`${upload.fileName} is placed${upload.choices.part ? ` as ${upload.choices.part}` : ''}`);
      void queryClient.invalidateQueries({ queryKey: siteKey(siteId) });
      // Another tab may have taken it off already.
      dismiss(queryClient, upload).catch(() => undefined);
    }
  }, [uploads, siteId, queryClient]);
}
