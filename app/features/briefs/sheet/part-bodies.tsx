import type { ReactNode } from 'react';
import type { BriefFacts } from '#contract/brief-content.ts';
import { formatMoney } from '#contract/format-money.ts';
import { HundredRule } from '#app/components/hundred-rule.tsx';
import { Table } from '#app/components/table.tsx';
import { formatDate } from '#app/lib/formats.ts';
import { of100 } from '#sim-core/compare/chance-words.ts';

/** The chance in large figures, the words beside it, and a rule of 100 futures for every option. */
export function AnswerBody({ facts, children }: { facts: BriefFacts; children: ReactNode }) {
  const figures = facts.outlooks[0].options;
  return (
    <>
      <div className="flex items-start gap-4 py-1">
        <p className="text-[52px] leading-none font-heavy tabular-nums" aria-hidden="true">
          {of100(figures[facts.lead].chance.estimate)}
        </p>
        <div className="min-w-0 flex-1 text-[17px] leading-snug">{children}</div>
      </div>
      <div className="grid gap-y-1 py-2">
        {figures.map(({ chance }, i) => (
          <div
            key={i}
            className="grid grid-cols-[minmax(0,1fr)_2.2ch] items-end gap-x-3 sm:grid-cols-[minmax(0,26%)_minmax(0,1fr)_2.2ch]"
          >
            <span className={`col-span-2 text-note sm:col-span-1 ${i === facts.lead ? 'font-bold' : ''}`}>
              {facts.options[i].name}
            </span>
            <HundredRule chance={chance} />
            <span className="text-right font-bold tabular-nums">
              <span className="sr-only">
                {`${of100(chance.estimate)} of 100, ${of100(chance.low)} to ${of100(chance.high)}`}
              </span>
              <span aria-hidden="true">{of100(chance.estimate)}</span>
            </span>
          </div>
        ))}
      </div>
    </>
  );
}

/** The closing years of every option as the version prints them, works on top, and their legend. */
export function MapsBody(props: {
  facts: BriefFacts;
  addressOf: (option: number) => string;
  children: ReactNode;
}) {
  const { facts } = props;
  const { grid, surveyYear, years } = facts;
  const shown = facts.options.flatMap(({ mapFutures }, i) => (mapFutures === null ? [] : [i]));
  return (
    <>
      {props.children}
      <div className="grid grid-cols-2 gap-2 py-1 sm:grid-cols-[repeat(auto-fit,minmax(140px,1fr))]">
        {shown.map((i) => {
          const { name, works, places } = facts.options[i];
          return (
            <figure key={i} className="min-w-0">
              <figcaption
                className={`truncate text-note ${i === facts.lead ? 'font-bold' : ''}`}
                title={name}
              >
                {name}
              </figcaption>
              <div
                className="relative border border-rule"
                style={{ aspectRatio: `${grid.width} / ${grid.height}` }}
              >
                <img
                  src={props.addressOf(i)}
                  alt={`Map of ${name}: ${works}. Colours give the year in which each place closes.`}
                  className="absolute inset-0 size-full"
                />
                <svg
                  viewBox={`0 0 ${(100 * grid.width) / grid.height} 100`}
                  className="absolute inset-0 size-full overflow-hidden"
                  aria-hidden="true"
                >
                  {places.map(([u, v], k) => (
                    <circle
                      key={k}
                      cx={(u * 100 * grid.width) / grid.height}
                      cy={v * 100}
                      r={places.length > 60 ? 1.2 : 2.2}
                      className="fill-flag stroke-ink"
                      strokeWidth={0.6}
                    />
                  ))}
                </svg>
              </div>
            </figure>
          );
        })}
      </div>
      {shown.length > 0 && (
        <p className="flex flex-wrap items-center gap-x-4 gap-y-1 text-note" aria-hidden="true">
          <span className="inline-flex items-center gap-1.5">
            closes {surveyYear + 1}
            <span className="inline-flex h-2.5 w-24">
              {rampClasses.map((each) => (
                <span key={each} className={`h-full flex-1 ${each}`} />
              ))}
            </span>
            {surveyYear + years}
          </span>
          <Swatch className="bg-[repeating-linear-gradient(-45deg,var(--color-late)_0_1px,var(--color-sheet)_1px_4px)]">
            open
          </Swatch>
          <Swatch className="bg-standing">stands</Swatch>
          <Swatch className="bg-water">cannot grow</Swatch>
          <span className="inline-flex items-center gap-1.5">
            <span className="size-2 rounded-full border border-ink bg-flag" />
            works
          </span>
        </p>
      )}
    </>
  );
}

const rampClasses = [
  'bg-closing-0',
  'bg-closing-1',
  'bg-closing-2',
  'bg-closing-3',
  'bg-closing-4',
  'bg-closing-5',
  'bg-closing-6',
  'bg-closing-7',
  'bg-closing-8',
];

function Swatch(props: { className: string; children: ReactNode }) {
  return (
    <span className="inline-flex items-center gap-1.5">
      <span className={`h-2.5 w-4 border border-rule ${props.className}`} />
      {props.children}
    </span>
  );
}

/** What each option costs. */
export function CostBody({ facts, children }: { facts: BriefFacts; children: ReactNode }) {
  const { currency } = facts;
  return (
    <>
      {children}
      {currency !== null && (
        <Table
          caption="What each option costs"
          rows={facts.options}
          rowKey={({ name }) => name}
          columns={[
            { key: 'name', head: 'option', cell: ({ name }) => name },
            { key: 'works', head: 'works', cell: ({ works }) => works },
            {
              key: 'cost',
              head: 'cost',
              number: true,
              cell: ({ cost }) => (cost === null ? '–' : formatMoney(cost, currency)),
            },
          ]}
        />
      )}
    </>
  );
}

/** What was decided, or that it is still open; a line to sign on. */
export function DecisionBody({ facts, children }: { facts: BriefFacts; children: ReactNode }) {
  const { decision } = facts;
  return (
    <>
      {children}
      {decision ? (
        <>
          <p className="my-1 font-bold">{decision.optionName}</p>
          <p className="my-1 whitespace-pre-wrap">{decision.reason}</p>
          {decision.reservations && <p className="my-1">Reservations: {decision.reservations}</p>}
          <p className="my-1">
            Recorded by {decision.decidedBy}, {formatDate(decision.decidedAt)}.
          </p>
        </>
      ) : (
        <p className="my-1">Not decided yet.</p>
      )}
      <div className="mt-9 mb-2 grid grid-cols-2 gap-4 text-note text-ink-2">
        <p className="border-t border-ink pt-0.5">Place and date</p>
        <p className="border-t border-ink pt-0.5">Signature</p>
      </div>
    </>
  );
}

/** What every brief says, whatever else is written in it. */
export function CautionsBody({ facts, children }: { facts: BriefFacts; children: ReactNode }) {
  return (
    <>
      {children}
      <ul className="my-1 text-ink-2">
        {facts.cautions.map((caution) => (
          <li
            key={caution}
            className="relative my-0.5 pl-4 before:absolute before:left-0 before:content-['–']"
          >
            {caution}
          </li>
        ))}
      </ul>
    </>
  );
}
