import { useMemo, useState } from 'react';
import type { SiteRecord } from '#contract/drought-records.ts';
import { Button } from '#app/components/button.tsx';
import { Dialog, DialogActions } from '#app/components/dialog.tsx';
import { WordChoice } from '#app/components/word-choice.tsx';
import { fitRecursion } from '#sim-core/weather/fit-recursion.ts';
import type { DrawnDraft } from './drawn-draft.ts';
import { RecursionFitView } from './recursion-fit.tsx';
import { RenewalFitView } from './renewal-fit.tsx';
import { drawnFromFit } from './drawn-from-fit.ts';

/** Weather fitted to the drought record, in two ways, each with how well it fits. */
export function FitDialog(props: {
  record: SiteRecord;
  threshold: number;
  surveyYear: number;
  /** left out for those who may only read */
  onUse: ((change: Partial<DrawnDraft>) => void) | undefined;
  onClose: () => void;
}) {
  const { record, threshold, surveyYear, onUse, onClose } = props;
  const [way, setWay] = useState<'renewal' | 'recursion'>('renewal');
  const recursion = useMemo(() => fitRecursion(record.years), [record.years]);
  const use =
    onUse &&
    ((weather: Parameters<typeof drawnFromFit>[0]) => {
      onUse(drawnFromFit(weather));
      onClose();
    });
  return (
    <Dialog
      open
      wide
      onOpenChange={(open) => {
        if (!open) onClose();
      }}
      title="Fit the weather to the record"
      description={`${record.name}, ${record.years[0].year} to ${record.years[record.years.length - 1].year}. A fit says what was; the trend of the outlook says what may change.`}
    >
      <div className="mt-2">
        <WordChoice
          label="As"
          showLabel
          options={[
            { key: 'renewal', label: 'droughts that come back' },
            { key: 'recursion', label: 'weather that remembers' },
          ]}
          value={way}
          onChange={setWay}
        />
      </div>
      {way === 'renewal' ? (
        <RenewalFitView
          years={record.years}
          threshold={threshold}
          surveyYear={surveyYear}
          onUse={use && ((fitted) => use({ kind: 'renewal', ...fitted }))}
        />
      ) : (
        <RecursionFitView
          years={record.years}
          fit={recursion}
          onUse={
            use &&
            ((fitted) => {
              const start = record.years.find(({ year }) => year === surveyYear)?.index;
              use({ kind: 'palmer-type', ...fitted, ...(start !== undefined && { start }) });
            })
          }
        />
      )}
      <DialogActions>
        <Button onClick={onClose}>Close</Button>
      </DialogActions>
    </Dialog>
  );
}
