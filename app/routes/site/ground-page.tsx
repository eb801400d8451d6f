import { useDeferredValue, useMemo, useState } from 'react';
import { useQueryClient } from '@tanstack/react-query';
import { useSearchParams } from 'react-router-dom';
import { allowedSource, layerOf, resurveysOf } from '#contract/layer-sources.ts';
import { layerParts, type LayerPart } from '#contract/layers.ts';
import { useSearchPatch } from '#app/lib/use-search-patch.ts';
import { LeaveGuard } from '#app/components/leave-guard.tsx';
import { LinkButton } from '#app/components/link-button.tsx';
import { useElevationDraft } from '#app/features/elevation/use-elevation-draft.ts';
import { classesForMap } from '#app/features/layers/class-draft.ts';
import { guessPart } from '#app/features/layers/guess-part.ts';
import { createSendingStore } from '#app/features/layers/uploads/sending-store.ts';
import { sendUpload } from '#app/features/layers/uploads/send-upload.ts';
import { useClassDraft } from '#app/features/layers/use-class-draft.ts';
import { useDropAnywhere } from '#app/features/layers/use-drop-anywhere.ts';
import { useGroundRasters } from '#app/features/layers/use-ground-rasters.ts';
import { missingGround } from '#app/features/sites/site-steps.ts';
import { useSettled } from '#app/lib/use-settled.ts';
import { GroundMap } from './ground-map.tsx';
import { GroundMargin } from './ground-margin.tsx';
import { GroundSaveBar } from './ground-save-bar.tsx';
import { GroundTools } from './ground-tools.tsx';
import { readView, viewKey } from './ground-view.ts';
import { SitePage } from './site-page.tsx';
import { useSite } from './use-site.ts';

/** How long a draft must rest before the engine's ground is worked out anew, ms. */
const rest = 350;

/** The ground of a site: its layers, what they mean, and what the engine will see of them. */
export function Page() {
  const { site, mayKeepGround } = useSite();
  const queryClient = useQueryClient();
  const habitat = layerOf(site, 'habitat');
  const classes = useClassDraft(site.id, habitat);
  const elevation = useElevationDraft(site);
  const [sending] = useState(() =>
    createSendingStore((file) => sendUpload(queryClient, site.teamId, { siteId: site.id, ...file })),
  );
  const taken = layerParts.filter((part) => layerOf(site, part) !== undefined);
  const present = layerParts.filter(
    (part) =>
      (part !== 'resurvey' && taken.includes(part)) ||
      (part === 'allowed' && allowedSource(site) !== undefined),
  );
  const years = resurveysOf(site).map(({ year }) => year);
  const addFiles = (files: File[], part?: LayerPart) =>
    sending.drop(files, (file) => part ?? guessPart(file.name, taken));
  useDropAnywhere(mayKeepGround ? addFiles : undefined);

  const [search] = useSearchParams();
  const patchSearch = useSearchPatch();
  const view = readView(search.get('layer'), present, years);
  const show = (next: NonNullable<typeof view>) => patchSearch({ layer: viewKey(next) });

  // The map follows while somebody types; on a large site it must not hold the typing up.
  const rows = useDeferredValue(classes.rows);
  const shownClasses = useMemo(() => classesForMap(rows), [rows]);
  const draft = useMemo(() => {
    const changed = classes.dirty || classes.suggested || habitat?.classes;
    return {
      ...site,
      elevationCurves: elevation.draft.elevationCurves,
      layers: site.layers.map((layer) =>
        layer.part === 'habitat' && changed ? { ...layer, classes: shownClasses } : layer,
      ),
    };
  }, [site, habitat, classes.dirty, classes.suggested, shownClasses, elevation.draft.elevationCurves]);
  const settled = useSettled(draft, rest);
  // What was saved is shown at once; a draft waits until the hand rests.
  const shownMap = view?.of === 'engine' ? view.map : undefined;
  const first = useMemo(() => (shownMap ? [...new Set(['capacity', shownMap] as const)] : []), [shownMap]);
  const ground = useGroundRasters(
    classes.dirty || classes.suggested || elevation.dirty ? settled : site,
    first,
  );

  const unsaved =
    mayKeepGround && (elevation.dirty || (habitat !== undefined && (classes.dirty || classes.suggested)));
  return (
    <SitePage
      step="ground"
      tools={<GroundTools {...{ present, years, view }} onShow={show} />}
      map={<GroundMap view={view} ground={ground} classes={shownClasses} />}
      margin={
        <>
          <GroundMargin
            {...{ ground, classes, elevation, view, sending, unsaved }}
            onShow={show}
            onFiles={addFiles}
          />
          <LeaveGuard
            when={mayKeepGround && (classes.dirty || elevation.dirty)}
            what={classes.dirty ? 'The class table' : 'The elevation curves'}
          />
        </>
      }
      action={
        unsaved ? (
          <GroundSaveBar {...{ classes, elevation }} />
        ) : missingGround(site.layers).length === 0 ? (
          <LinkButton to={`/sites/${site.id}/plant`}>On to Plant</LinkButton>
        ) : undefined
      }
    />
  );
}
