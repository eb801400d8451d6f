import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { sayDone } from '#app/components/toast.tsx';
import { recordMutation, recordsQuery } from '#app/features/outlook/change-outlook.ts';
import type { DrawnDraft } from '#app/features/outlook/drawn-draft.ts';
import { FitDialog } from '#app/features/outlook/fit-dialog.tsx';
import { RecordDialog } from '#app/features/outlook/record-dialog.tsx';
import { RecordHistory } from '#app/features/outlook/record-history.tsx';
import { RecordSection } from '#app/features/outlook/record-section.tsx';
import { formatCounted } from '#app/lib/formats.ts';
import { useSite } from './use-site.ts';

/** The drought record of the site with its dialogs: taking one, fitting weather to it, all that there were. */
export function OutlookRecord(props: {
  surveyYear: number;
  onWeather: (change: Partial<DrawnDraft>) => void;
}) {
  const { site, mayKeepGround } = useSite();
  const [open, setOpen] = useState<'take' | 'fit' | 'history'>();
  const store = useMutation(recordMutation(useQueryClient(), site.id));
  const history = useQuery({ ...recordsQuery(site.id), enabled: open === 'history' });
  const { droughtRecord: record } = site;
  const { tolerance } = site.plant.rates;
  const close = () => {
    setOpen(undefined);
    store.reset();
  };
  return (
    <>
      <RecordSection
        record={record}
        editable={mayKeepGround}
        threshold={tolerance}
        onTake={() => setOpen('take')}
        onFit={() => setOpen('fit')}
        onReadOn={
          record && record.gaps.length === 0
            ? () =>
                props.onWeather({
                  kind: 'series',
                  record: record.years.map(({ year, index }) => ({ year, value: index })),
                })
            : undefined
        }
        onHistory={() => setOpen('history')}
      />
      {open === 'take' && (
        <RecordDialog
          threshold={tolerance}
          busy={store.isPending}
          error={store.error}
          onOpenChange={close}
          onUse={(taken, fileName) =>
            store.mutate(
              { record: taken, fileName },
              {
                onSuccess: ({ droughtRecord }) => {
                  close();
                  sayDone(`Record stored, ${formatCounted(droughtRecord?.years.length ?? 0, 'year')}`);
                },
              },
            )
          }
        />
      )}
      {open === 'fit' && record && (
        <FitDialog
          record={record}
          threshold={tolerance}
          surveyYear={props.surveyYear}
          onUse={mayKeepGround ? props.onWeather : undefined}
          onClose={close}
        />
      )}
      {open === 'history' && (
        <RecordHistory
          records={history.data?.records}
          error={history.error ?? store.error}
          editable={mayKeepGround}
          busy={store.isPending}
          onTakeAgain={({ name, source, kind, factor, season, values, fileName }) =>
            store.mutate({ record: { name, source, kind, factor, season, values }, fileName })
          }
          onForget={({ id }) => store.mutate({ forget: id })}
          onClose={close}
        />
      )}
    </>
  );
}
