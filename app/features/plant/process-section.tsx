import type { ReactNode } from 'react';
import { WordChoice } from '#app/components/word-choice.tsx';
import type { AnyRateName } from '#sim-core/spec/all-parameters.ts';
import type { Parameter } from '#sim-core/spec/parameters.ts';
import type { ProcessSheet } from './plant-draft.ts';
import { RateRows, type RateKnowledge } from './rate-row.tsx';
import { RateSection } from './rate-section.tsx';
import type { SheetErrors } from './rate-sheet.ts';

/** A process that is off until somebody turns it on, with its rates while it is on. */
export function ProcessSection<Name extends AnyRateName>(props: {
  title: string;
  note: string;
  table: Readonly<Record<Name, Parameter>>;
  sheet: ProcessSheet<Name>;
  errors: SheetErrors<Name>;
  editable: boolean;
  knowledge: RateKnowledge;
  /** whether it is on in the plant as saved */
  saved: boolean;
  onChange: (sheet: ProcessSheet<Name>) => void;
  /** what the rates come to, in words */
  children?: ReactNode;
}) {
  const { title, table, sheet, editable } = props;
  return (
    <RateSection title={title} note={props.note}>
      <div className="flex flex-wrap items-center gap-x-6 gap-y-1 border-t border-rule-2 py-2">
        {editable ? (
          <WordChoice
            label={title}
            options={[
              { key: 'off', label: 'Off' },
              { key: 'on', label: 'On' },
            ]}
            value={sheet.on ? 'on' : 'off'}
            onChange={(choice) => props.onChange({ ...sheet, on: choice === 'on' })}
          />
        ) : (
          <span className="text-[13.5px] font-bold">{sheet.on ? 'On' : 'Off'}</span>
        )}
        {!sheet.on && props.saved && (
          <span className="text-note text-ink-2">Saved as off, the rates are forgotten.</span>
        )}
      </div>
      {sheet.on && (
        <>
          <RateRows
            table={table}
            names={Object.keys(table) as Name[]}
            sheet={sheet}
            errors={props.errors}
            editable={editable}
            knowledge={props.knowledge}
            onChange={(rates) => props.onChange({ ...rates, on: true })}
          />
          {props.children}
        </>
      )}
    </RateSection>
  );
}
