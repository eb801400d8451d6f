import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { featureKinds, type FeatureImportForm, type FeatureKind } from '#contract/features.ts';
import { BlankSelect } from '#app/components/blank.tsx';
import { Button } from '#app/components/button.tsx';
import { Dialog, DialogActions } from '#app/components/dialog.tsx';
import { FileDrop } from '#app/components/file-drop.tsx';
import { ProblemNotice } from '#app/components/notice.tsx';
import { NumberBlank } from '#app/components/number-blank.tsx';
import { sayDone } from '#app/components/toast.tsx';
import { formatBytes, formatCounted } from '#app/lib/formats.ts';
import { importMutation } from './change-features.ts';
import { kindLabels, kindMeanings } from './feature-words.ts';
import { ImportPreview } from './import-preview.tsx';

type Settings = Omit<FeatureImportForm, 'take'>;

/** Points and areas from GeoJSON or CSV: read, looked at row by row, then kept. */
export function ImportDialog(props: { siteId: string; onClose: () => void }) {
  const { siteId, onClose } = props;
  const [file, setFile] = useState<File>();
  const [settings, setSettings] = useState<Settings>({
    kind: 'refuge',
    radius: 2,
    strength: 1,
    halo: 0,
  });
  const queryClient = useQueryClient();
  const look = useMutation(importMutation(queryClient, siteId));
  const keep = useMutation(importMutation(queryClient, siteId));
  const read = (chosen: File | undefined, next: Settings) => {
    setFile(chosen);
    setSettings(next);
    keep.reset();
    if (chosen) look.mutate({ file: chosen, ...next, take: 'preview' });
  };
  const preview = look.data;
  const take = (how: 'all' | 'good') => {
    if (!file) return;
    keep.mutate(
      { file, ...settings, take: how },
      {
        onSuccess: ({ good }) => {
          sayDone(`${formatCounted(good, kindLabels[settings.kind])} kept from ${file.name}`);
          onClose();
        },
      },
    );
  };
  const change = (more: Partial<Settings>) => read(file, { ...settings, ...more });
  const blank = (label: string, name: 'radius' | 'strength' | 'halo', least: number, most: number) => (
    <NumberBlank
      label={label}
      value={settings[name]}
      {...{ least, most }}
      characters={4}
      onValue={(value) => change({ [name]: value })}
    />
  );
  return (
    <Dialog
      open
      wide
      onOpenChange={onClose}
      title="Points and areas from a file"
      description="GeoJSON, or CSV with a header row: x, y in the site’s CRS or lon, lat; name, radius, strength and halo where they are known."
    >
      <p className="mt-3 leading-7">
        They are{' '}
        <BlankSelect
          label="What the points and areas are"
          value={settings.kind}
          onChange={(event) => change({ kind: event.target.value as FeatureKind })}
        >
          {featureKinds.map((kind) => (
            <option key={kind} value={kind}>
              {kindLabels[kind]}
            </option>
          ))}
        </BlankSelect>
        . Where the file does not say, a point has a radius of{' '}
        {blank('Radius where the file does not say, m', 'radius', 0.01, 1000)} m
        {settings.kind !== 'allowed' && (
          <> and strength {blank('Strength where the file does not say, 0 to 1', 'strength', 0, 1)}</>
        )}
        {settings.kind === 'refuge' && (
          <>, fading over {blank('Halo where the file does not say, m', 'halo', 0, 1000)} m</>
        )}
        .
      </p>
      <p className="mb-3 text-note text-ink-2">{kindMeanings[settings.kind]}</p>
      <FileDrop
        label="Drop a GeoJSON or CSV here"
        accept=".geojson,.json,.csv,.txt,application/geo+json,text/csv"
        fileName={file && `${file.name}, ${formatBytes(file.size)}`}
        onFile={(chosen) => read(chosen, settings)}
      />
      <div aria-live="polite" className="mt-2 min-h-8">
        {look.isPending && <p className="text-note text-ink-2">Reading {file?.name} …</p>}
        {look.error && (
          <ProblemNotice error={look.error} title={`${file?.name ?? 'The file'} cannot be used.`} />
        )}
        {preview && !look.isPending && <ImportPreview preview={preview} />}
        {keep.error && <ProblemNotice error={keep.error} className="mt-2" />}
      </div>
      <DialogActions>
        <Button
          kind="primary"
          disabled={!preview || look.isPending || preview.good === 0}
          busy={keep.isPending}
          onClick={() => take(preview && preview.bad > 0 ? 'good' : 'all')}
        >
          {!preview || preview.good === 0
            ? 'Keep them'
            : preview.bad > 0
              ? `Keep the ${formatCounted(preview.good, 'good one')}`
              : `Keep ${preview.good === 1 ? 'it' : `all ${preview.good}`}`}
        </Button>
        <Button onClick={onClose}>Leave it</Button>
      </DialogActions>
    </Dialog>
  );
}
