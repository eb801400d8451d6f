import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import type { Feature } from '#contract/features.ts';
import { ConfirmDialog } from '#app/components/confirm-dialog.tsx';
import { ProblemNotice } from '#app/components/notice.tsx';
import { WordButton } from '#app/components/word-button.tsx';
import { formatCounted, formatDate } from '#app/lib/formats.ts';
import { deleteImportMutation } from './change-features.ts';
import { FeatureEditor } from './feature-editor.tsx';
import { featureInWords, featureName, kindLabels } from './feature-words.ts';
import { ImportDialog } from './import-dialog.tsx';

const shownAtFirst = 6;

/** Surveyed points and areas of a site, by the file that they came with. */
export function FeatureSection(props: { siteId: string; features: readonly Feature[]; editable: boolean }) {
  const { siteId, features, editable } = props;
  const [importing, setImporting] = useState(false);
  const imports = [...new Map(features.map(({ source }) => [source.importId, source])).values()];
  return (
    <section aria-label="Points and areas" className="border-t border-ink py-2.5">
      <h2 className="text-body">Points and areas</h2>
      {features.length === 0 && (
        <p className="text-note text-ink-2">
          None. Surveyed mounds, standing fences and allowed ground can come from GeoJSON or CSV.
        </p>
      )}
      {imports.map((source) => (
        <ImportGroup
          key={source.importId}
          {...{ siteId, source, editable }}
          features={features.filter((feature) => feature.source.importId === source.importId)}
        />
      ))}
      {editable && (
        <WordButton lined onClick={() => setImporting(true)}>
          Import points or areas
        </WordButton>
      )}
      {importing && <ImportDialog siteId={siteId} onClose={() => setImporting(false)} />}
    </section>
  );
}

function ImportGroup(props: {
  siteId: string;
  source: Feature['source'];
  features: readonly Feature[];
  editable: boolean;
}) {
  const { siteId, source, features, editable } = props;
  const [all, setAll] = useState(false);
  const [edited, setEdited] = useState<string>();
  const [asking, setAsking] = useState(false);
  const queryClient = useQueryClient();
  const remove = useMutation(deleteImportMutation(queryClient, siteId));
  const shown = all ? features : features.slice(0, shownAtFirst);
  return (
    <div className="border-t border-rule-2 py-1.5 text-note">
      <p className="wrap-anywhere text-ink-2">
        <span className="font-mono text-ink">{source.fileName}</span>:{' '}
        {formatCounted(features.length, kindLabels[features[0].kind])}, {source.importedBy},{' '}
        {formatDate(source.importedAt)}
      </p>
      <ul>
        {shown.map((feature) => {
          const name = featureName({ ...feature, row: feature.source.row });
          return (
            <li key={feature.id} className="border-t border-rule-2 py-0.5">
              {edited === feature.id ? (
                <FeatureEditor siteId={siteId} feature={feature} onClose={() => setEdited(undefined)} />
              ) : (
                <span className="flex items-baseline justify-between gap-2">
                  <span>
                    <b>{name}</b>, {featureInWords(feature)}
                  </span>
                  {editable && (
                    <WordButton onClick={() => setEdited(feature.id)}>
                      change<span className="sr-only"> {name}</span>
                    </WordButton>
                  )}
                </span>
              )}
            </li>
          );
        })}
      </ul>
      <div className="flex flex-wrap gap-x-4">
        {features.length > shownAtFirst && (
          <WordButton lined onClick={() => setAll(!all)}>
            {all ? 'Show fewer' : `Show all ${features.length}`}
          </WordButton>
        )}
        {editable && (
          <WordButton lined onClick={() => setAsking(true)}>
            Delete them all<span className="sr-only"> of {source.fileName}</span>
          </WordButton>
        )}
      </div>
      {remove.error && !asking && <ProblemNotice error={remove.error} className="mt-1" />}
      <ConfirmDialog
        open={asking}
        onOpenChange={setAsking}
        title={`Delete all that came with ${source.fileName}?`}
        description={`${formatCounted(features.length, kindLabels[features[0].kind])} would go from the site. Runs keep what they were started with; the file can be imported again.`}
        action="Delete them"
        keep="Keep them"
        busy={remove.isPending}
        error={remove.error}
        onConfirm={() => remove.mutate(source.importId, { onSuccess: () => setAsking(false) })}
      />
    </div>
  );
}
