import { useDeferredValue, useMemo, useState } from 'react';
import { useQueryClient } from '@tanstack/react-query';
import { useSearchParams } from 'react-router-dom';
import type { LayerPart } from '#contract/layers.ts';
import { layerParts } from '#contract/layers.ts';
import { useSearchPatch } from '#app/lib/use-search-patch.ts';
import { LeaveGuard } from '#app/components/leave-guard.tsx';
import { LinkButton } from '#app/components/link-button.tsx';
import { SaveBar } from '#app/components/save-bar.tsx';
import { WordChoice } from '#app/components/word-choice.tsx';
import { classesForMap } from '#app/features/layers/class-draft.ts';
import { guessPart } from '#app/features/layers/guess-part.ts';
import { partLabels } from '#app/features/layers/part-words.ts';
import { createUploadStore } from '#app/features/layers/upload-store.ts';
import { sendLayer } from '#app/features/layers/upload-layer.ts';
import { useClassDraft } from '#app/features/layers/use-class-draft.ts';
import { useDropAnywhere } from '#app/features/layers/use-drop-anywhere.ts';
import { useGroundRasters } from '#app/features/layers/use-ground-rasters.ts';
import { missingGround } from '#app/features/sites/site-steps.ts';
import { formatCounted } from '#app/lib/formats.ts';
import { GroundMap } from './ground-map.tsx';
import { GroundMargin } from './ground-margin.tsx';
import { SitePage } from './site-page.tsx';
import { useSite } from './use-site.ts';

/** The rasters of a site: each on the map, in words, and with what its values mean. */
export function Page() {
  const { site, mayKeepGround } = useSite();
  const queryClient = useQueryClient();
  const rasters = useGroundRasters(site);
  const habitat = site.layers.find((layer) => layer.part === 'habitat');
  const classes = useClassDraft(site.id, habitat);
  const [uploads] = useState(() => createUploadStore((upload) => sendLayer(queryClient, site.id, upload)));
  const taken = useMemo(() => site.layers.map((layer) => layer.part), [site.layers]);
  const addFiles = (files: File[]) =>
    uploads.tell({ type: 'dropped', files, guess: (file) => guessPart(file.name, taken) });
  useDropAnywhere(mayKeepGround ? addFiles : undefined);

  const [search] = useSearchParams();
  const patchSearch = useSearchPatch();
  const asked = search.get('layer');
  const present = layerParts.filter((part) => taken.includes(part));
  const shown = present.find((part) => part === asked) ?? present.at(0);
  const show = (part: LayerPart) => patchSearch({ layer: part });

  // The map follows while somebody types; on a large site it must not hold the typing up.
  const rows = useDeferredValue(classes.rows);
  const shownClasses = useMemo(() => classesForMap(rows), [rows]);
  const unsaved = mayKeepGround && habitat !== undefined && (classes.dirty || classes.suggested);

  return (
    <SitePage
      step="ground"
      tools={
        <div className="flex min-h-8 flex-wrap items-center gap-x-6">
          {shown === undefined ? (
            <span className="text-[13.5px] text-ink-2">No layer to show yet</span>
          ) : (
            <WordChoice
              label="The map shows"
              showLabel
              options={present.map((key) => ({ key, label: partLabels[key].toLowerCase() }))}
              value={shown}
              onChange={show}
            />
          )}
        </div>
      }
      map={<GroundMap shown={shown} rasters={rasters} classes={shownClasses} />}
      margin={
        <>
          <GroundMargin
            {...{ rasters, classes, shown, uploads, taken, unsaved }}
            onShow={show}
            onFiles={addFiles}
          />
          <LeaveGuard when={mayKeepGround && classes.dirty} what="The class table" />
        </>
      }
      action={
        unsaved ? (
          <SaveBar
            label="Save the class table"
            dirty={classes.dirty}
            busy={classes.saving}
            words={
              classes.wrong > 0
                ? `${formatCounted(classes.wrong, 'class', 'classes')} to mend first.`
                : classes.dirty
                  ? 'Changed and not saved.'
                  : 'Suggested; not saved yet.'
            }
            onSave={classes.save}
            onRevert={classes.revert}
          />
        ) : missingGround(site.layers).length === 0 ? (
          <LinkButton to={`/sites/${site.id}/plant`}>On to Plant</LinkButton>
        ) : undefined
      }
    />
  );
}
