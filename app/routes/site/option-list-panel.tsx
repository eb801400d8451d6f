import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { useMemo, useState } from 'react';
import type { Option } from '#contract/options.ts';
import type { Work } from '#contract/works.ts';
import { ProblemNotice } from '#app/components/notice.tsx';
import { sayDone } from '#app/components/toast.tsx';
import { WordButton } from '#app/components/word-button.tsx';
import type { GroundRasters } from '#app/features/layers/use-ground-rasters.ts';
import { ConflictNotice } from '#app/features/options/conflict/conflict-notice.tsx';
import { CostsDialog } from '#app/features/options/costs/costs-dialog.tsx';
import { comparisonsQuery, latestDecision } from '#app/features/comparisons/get-comparison.ts';
import { costsQuery } from '#app/features/options/costs/site-costs.ts';
import type { FoundWorks } from '#app/features/options/files/works-to-add.ts';
import { restoreDraft } from '#app/features/options/draft-storage.ts';
import { ArchiveList } from '#app/features/options/list/archive-list.tsx';
import { OptionGrid } from '#app/features/options/list/option-grid.tsx';
import { usePictureBase } from '#app/features/options/list/option-picture.tsx';
import { optionCost } from '#app/features/options/list/option-costs.ts';
import { movedTo, orderMutation } from '#app/features/options/list/order.ts';
import { isUnsaved } from '#app/features/options/option-draft.ts';
import { formatMoney } from '#contract/format-money.ts';
import type { OptionDrawing } from '#app/features/options/use-option-drawing.ts';
import { formatCounted } from '#app/lib/formats.ts';
import { OptionDeeds } from './option-deeds.tsx';
import { useSite } from './use-site.ts';

export interface OptionListPanelProps {
  options: readonly Option[];
  option: Option;
  drawing: OptionDrawing;
  ground: GroundRasters;
  mayDraw: boolean;
  onAdd: (found: FoundWorks) => string | undefined;
  /** `isNew`: it was made this moment */
  onChoose: (optionId: string, isNew?: boolean) => void;
}

/** The options as pictures with what each costs, what can be done with the chosen one, and the archive. */
export function OptionListPanel(props: OptionListPanelProps) {
  const { options, option, drawing, ground, mayDraw, onChoose } = props;
  const { site } = useSite();
  const queryClient = useQueryClient();
  const base = usePictureBase(site.grid, ground.cover, ground.capacity);
  const costs = useQuery(costsQuery(site.id)).data;
  const decided = latestDecision(useQuery(comparisonsQuery(site.id)).data?.comparisons)?.optionId;
  const order = useMutation(orderMutation(queryClient, site.id));
  const [costing, setCosting] = useState(false);
  const [listed, archived] = [false, true].map((away) => options.filter((one) => one.archived === away));
  const costOf = useMemo(
    () =>
      costs && costs.changedAt !== null
        ? (works: readonly Work[]) => optionCost(site, costs.costs, works)
        : undefined,
    [costs, site],
  );
  const unsaved = (other: Option) =>
    other.id === option.id ? drawing.unsaved : !other.wait && isUnsaved(restoreDraft(other));
  const move = (id: string, to: number) => {
    const ids = listed.slice(1).map((one) => one.id);
    const next = movedTo(ids, id, to);
    if (next.join() === ids.join()) return;
    const place = `${listed.find((one) => one.id === id)?.name ?? ''} is now number ${next.indexOf(id) + 1} of ${next.length}`;
    order.mutate([...next, ...archived.map((one) => one.id)], { onSuccess: () => sayDone(place) });
  };
  const budget = costs && costs.changedAt !== null ? costs.costs.budget : null;
  const told =
    costs && budget !== null
      ? `line on each bar: budget of ${formatMoney(budget, costs.costs.currency)}`
      : `${formatCounted(listed.length - 1, 'option')} beside Wait`;
  const place = listed.findIndex((one) => one.id === option.id) - 1;
  return (
    <>
      {drawing.conflict && (
        <ConflictNotice
          theirs={option}
          mine={drawing.draft}
          madeOn={drawing.draft.revision}
          busy={drawing.saving}
          onKeepMine={() =>
            void drawing.keepAsCopy().then((copy) => {
              if (!copy) return;
              sayDone(`Saved as ${copy.name}`);
              onChoose(copy.id);
            })
          }
          onTakeTheirs={drawing.takeTheirs}
          onMerge={drawing.merge}
        />
      )}
      {drawing.error ? <ProblemNotice error={drawing.error} title="Not saved." className="my-2" /> : null}
      {order.error ? <ProblemNotice error={order.error} title="Not moved." className="my-2" /> : null}
      <div className="flex flex-wrap items-baseline justify-between gap-x-3 pb-1.5">
        <h1 className="text-lead font-bold">Options</h1>
        <span className="text-note text-ink-2">{told}</span>
      </div>
      <OptionGrid
        options={listed}
        chosen={option.id}
        drawn={drawing.draft.works}
        {...{ base, costOf, unsaved, decided }}
        onChoose={(id) => onChoose(id)}
        onMove={mayDraw ? move : undefined}
      />
      {option.note !== '' && (
        <p className="mt-2 border-l-[3px] border-rule pl-2.5 text-note whitespace-pre-line">{option.note}</p>
      )}
      <div className="mt-2 flex flex-wrap items-baseline gap-x-4 border-t border-rule pt-1">
        <OptionDeeds
          {...props}
          base={base}
          place={place}
          places={listed.length - 1}
          onMove={(to) => move(option.id, to)}
        />
        {mayDraw && costs && <WordButton onClick={() => setCosting(true)}>Costs</WordButton>}
      </div>
      <ArchiveList options={archived} chosen={option.id} onChoose={(id) => onChoose(id)} />
      {costing && costs && <CostsDialog siteId={site.id} set={costs} onClose={() => setCosting(false)} />}
    </>
  );
}
