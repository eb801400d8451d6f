import { useSyncExternalStore } from 'react';
import { layerParts, type LayerPart } from '#contract/layers.ts';
import { BlankSelect } from '#app/components/blank.tsx';
import { Button } from '#app/components/button.tsx';
import { ProblemNotice } from '#app/components/notice.tsx';
import { Progress } from '#app/components/progress.tsx';
import { WordButton } from '#app/components/word-button.tsx';
import { formatBytes, formatCounted } from '#app/lib/formats.ts';
import { doubledParts, type Upload } from './upload-queue.ts';
import type { UploadStore } from './upload-store.ts';

/** The files of a drop zone: each is asked for its part, then sent; what was refused stays with the reason. */
export function UploadList(props: {
  store: UploadStore;
  taken: readonly LayerPart[];
  /** whether sending is the action of the page that matters now */
  primary: boolean;
}) {
  const { store, taken } = props;
  const uploads = useSyncExternalStore(store.subscribe, store.snapshot);
  const asking = uploads.filter((upload) => upload.state.kind === 'asking');
  const undecided = asking.filter((upload) => upload.part === undefined);
  const doubled = doubledParts(uploads);
  if (uploads.length === 0) return null;
  return (
    <div className="mb-3">
      <ul>
        {uploads.map((upload) => (
          <li key={upload.key} className="border-t border-rule-2 py-2">
            <UploadEntry upload={upload} store={store} taken={taken} />
          </li>
        ))}
      </ul>
      {asking.length > 0 && (
        <div className="mt-1 flex flex-wrap items-center gap-x-3 gap-y-1">
          <Button
            kind={props.primary ? 'primary' : 'quiet'}
            disabled={undecided.length > 0 || doubled.length > 0}
            onClick={() => store.tell({ type: 'confirmed', keys: asking.map((upload) => upload.key) })}
          >
            Upload {formatCounted(asking.length, 'file')}
          </Button>
          <p role="status" className="text-note text-ink-2">
            {undecided.length > 0 && 'Say which part each file plays.'}
            {doubled.length > 0 &&
              `Two files cannot both be ${doubled.join(' and ')}: choose another part, or take one off.`}
          </p>
        </div>
      )}
    </div>
  );
}

function UploadEntry(props: { upload: Upload; store: UploadStore; taken: readonly LayerPart[] }) {
  const { upload, store, taken } = props;
  const { key, file, part, state } = upload;
  const name = <span className="font-mono text-note wrap-anywhere">{file.name}</span>;
  const off = (words: string) => (
    <WordButton lined onClick={() => store.remove(key)}>
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
  if (state.kind === 'sending') {
    const { sent, total = file.size } = state.progress;
    const checking = sent >= total;
    return (
      <>
        <Progress
          label={checking ? `${file.name}: reading and checking` : `${file.name} as ${part}`}
          done={sent}
          of={total}
          note={checking ? undefined : `${formatBytes(sent)} of ${formatBytes(total)}`}
        />
        <div className="mt-1">{off('Cancel')}</div>
      </>
    );
  }
  if (state.kind === 'waiting')
    return (
      <div className="flex items-baseline justify-between gap-3 text-note">
        <span>
          {name} as {part}, waiting
        </span>
        {off('Cancel')}
      </div>
    );
  return (
    <div className="flex flex-wrap items-baseline justify-between gap-x-3 text-note">
      <span>
        {name} is{' '}
        <BlankSelect
          label={`The part that ${file.name} plays`}
          value={part ?? ''}
          onChange={(event) => store.tell({ type: 'chose', key, part: event.target.value as LayerPart })}
        >
          <option value="" disabled>
            choose its part
          </option>
          {layerParts.map((choice) => (
            <option key={choice} value={choice}>
              {choice}
            </option>
          ))}
        </BlankSelect>
        {part !== undefined && taken.includes(part) && (
          <span className="text-ink-2"> and replaces the one that is there</span>
        )}
      </span>
      {off('Take off')}
    </div>
  );
}
