import type { ReactNode } from 'react';
import type { Option } from '#contract/options.ts';
import { Table } from '#app/components/table.tsx';
import type { GroundRasters } from '#app/features/layers/use-ground-rasters.ts';
import type { FoundWorks } from '#app/features/options/files/works-to-add.ts';
import type { OptionDrawing } from '#app/features/options/use-option-drawing.ts';
import { WorkSymbol } from '#app/features/options/works-table.tsx';
import { countOf, worksByYear } from '#contract/works-words.ts';
import { OptionListPanel } from './option-list-panel.tsx';

/** The options, what the chosen one holds, and what to mind. */
export function OptionMargin(props: {
  options: readonly Option[];
  option: Option;
  drawing: OptionDrawing;
  ground: GroundRasters;
  mayDraw: boolean;
  /** Adds works from a file to the drawing; returns why they cannot be taken. */
  onAdd: (found: FoundWorks) => string | undefined;
  /** what is selected, above all else */
  selection: ReactNode;
  /** more of what it costs */
  costs: ReactNode;
  /** what could be added to it */
  suggest: ReactNode;
  /** `isNew`: it was made this moment */
  onChoose: (optionId: string, isNew?: boolean) => void;
}) {
  const { option, drawing } = props;
  const { draft } = drawing;
  const groups = worksByYear(draft.works);
  return (
    <>
      {props.selection}
      <OptionListPanel {...props} />
      <h2 className="mt-4 mb-1 border-t border-rule pt-2 text-body font-bold">Works in {option.name}</h2>
      {groups.length === 0 ? (
        <p className="text-note text-ink-2">
          {option.wait
            ? 'None: the ground is left to what survived.'
            : 'None yet. Choose a tool above the map, then press the map.'}
        </p>
      ) : (
        <Table
          caption={`Works in ${option.name}, by year`}
          headless
          columns={[
            {
              key: 'what',
              head: 'works',
              cell: ({ kind, count }) => (
                <>
                  <WorkSymbol work={{ kind }} /> {countOf(kind, count)}
                </>
              ),
            },
            { key: 'year', head: 'year', number: true, cell: ({ year }) => year },
          ]}
          rows={groups}
          rowKey={({ kind, year }) => `${kind}${year}`}
        />
      )}
      {props.costs}
      {props.suggest}
      <p className="mt-4 text-note text-ink-2">
        Moving bivalves between water bodies can need a permit and a biosecurity check. Work between the tides
        needs tide, weather and mud precautions. Follow local codes and licensed practice.
      </p>
    </>
  );
}
