import type { ReactNode } from 'react';
import { Link } from 'react-router-dom';
import { classNames } from '#app/lib/class-names.ts';
import { StaffRule } from './staff-rule.tsx';

export interface StaffStep {
  key: string;
  label: string;
  /** where it leads; a step without is not available and cannot be pressed */
  to?: string;
  /** how it stands, in words: `6 layers on a 1 m grid`, `needs a class table` */
  state: string;
  /** 0..1, how much of it is done */
  share: number;
}

export interface TideStaffProps {
  /** name of the site */
  title: string;
  /** `Foothold, Northmarsh Restoration Trust` */
  note: string;
  steps: readonly StaffStep[];
  current: string;
  /** the menu of who is signed in */
  person: ReactNode;
}

/** The row of steps as a graduated rule that fills as the work is done. On a phone it folds to `step 4 of 7`. */
export function TideStaff(props: TideStaffProps) {
  return (
    <header className="no-print relative border-b border-ink bg-ground">
      <div className="hidden h-14 lg:flex">
        <Place title={props.title} note={props.note} className="w-[268px] shrink-0 pt-[9px] pl-6" />
        <nav aria-label="Steps" className="min-w-0 flex-1">
          <ol className="flex h-full">
            {props.steps.map((step) => (
              <StepMark key={step.key} step={step} current={step.key === props.current} />
            ))}
          </ol>
        </nav>
        <div className="w-[132px] shrink-0 border-l border-ink/55 pt-[7px] pr-6 pl-2 text-right">
          {props.person}
        </div>
      </div>
      <FoldedStaff {...props} />
    </header>
  );
}

function Place(props: { title: string; note: string; className?: string }) {
  return (
    <div className={classNames('min-w-0 leading-tight', props.className)}>
      <Link
        to="/"
        className="block truncate pr-3 text-lead leading-tight font-bold no-underline hover:underline"
      >
        {props.title}
      </Link>
      <span className="block truncate pr-3 text-note text-ink-2">{props.note}</span>
    </div>
  );
}

function StepMark({ step, current }: { step: StaffStep; current: boolean }) {
  const words = (
    <>
      <b
        className={classNames('block text-body leading-tight', current ? 'font-extrabold' : 'font-semibold')}
      >
        {step.label}
      </b>
      <span className={classNames('block truncate text-note leading-snug', !current && 'text-ink-2')}>
        {step.state}
      </span>
    </>
  );
  const place = 'block h-full min-w-0 pt-[9px] pr-1 pl-2.5 no-underline';
  return (
    <li
      aria-current={current ? 'step' : undefined}
      className={classNames('relative min-w-0 flex-1 border-l', current ? 'border-ink' : 'border-ink/55')}
    >
      {current && (
        <svg viewBox="0 0 12 12" aria-hidden="true" className="absolute top-0.5 left-0 size-3">
          <path d="M0 0h12L0 12z" className="fill-ink" />
        </svg>
      )}
      {step.to === undefined ? (
        <div className={classNames(place, 'text-ink-3')}>{words}</div>
      ) : (
        <Link to={step.to} title={step.state} className={classNames(place, 'hover:bg-sheet')}>
          {words}
        </Link>
      )}
      <div className="pointer-events-none absolute inset-x-0 bottom-0">
        <StaffRule share={step.share} />
      </div>
    </li>
  );
}

function FoldedStaff({ title, note, steps, current, person }: TideStaffProps) {
  const index = steps.findIndex((step) => step.key === current);
  const here = steps[index];
  const folded = here ? `${here.label}, step ${index + 1} of ${steps.length}` : note;
  return (
    <div className="lg:hidden">
      <details key={current} className="group">
        <summary className="flex h-[58px] list-none items-center justify-between gap-3 px-4 [&::-webkit-details-marker]:hidden">
          <span className="min-w-0 leading-tight">
            <b className="block truncate text-lead leading-tight">{title}</b>
            <span className="block truncate text-note text-ink-2">{folded}</span>
          </span>
          <span className="flex min-h-11 shrink-0 items-center font-semibold">
            <span className="group-open:hidden">All steps</span>
            <span className="hidden group-open:inline">Close</span>
          </span>
        </summary>
        <nav aria-label="Steps" className="border-t border-rule">
          <ol>
            {steps.map((step) => (
              <FoldedStep key={step.key} step={step} current={step.key === current} />
            ))}
          </ol>
          <div className="flex items-center justify-between border-t border-rule px-4 py-1">
            <Link to="/" className="flex min-h-11 items-center">
              All sites
            </Link>
            {person}
          </div>
        </nav>
      </details>
      <div className="flex">
        {steps.map((step) => (
          <div key={step.key} className="flex-1">
            <StaffRule share={step.share} blocks={8} />
          </div>
        ))}
      </div>
    </div>
  );
}

function FoldedStep({ step, current }: { step: StaffStep; current: boolean }) {
  const row = classNames(
    'flex min-h-12 items-baseline justify-between gap-4 border-t border-rule-2 px-4 py-2.5 no-underline',
    current && 'border-l-[5px] border-l-ink pl-[11px]',
  );
  const words = (
    <>
      <b className={current ? 'font-extrabold' : 'font-semibold'}>{step.label}</b>
      <span className="text-right text-note text-ink-2">{step.state}</span>
    </>
  );
  return (
    <li aria-current={current ? 'step' : undefined}>
      {step.to === undefined ? (
        <div className={classNames(row, 'text-ink-3')}>{words}</div>
      ) : (
        <Link to={step.to} className={row}>
          {words}
        </Link>
      )}
    </li>
  );
}
