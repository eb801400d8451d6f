import { useState } from 'react';
import type { Comparison } from '#contract/comparisons.ts';
import { Button } from '#app/components/button.tsx';
import { TextAreaField } from '#app/components/inputs.tsx';
import { ProblemNotice } from '#app/components/notice.tsx';
import { WordButton } from '#app/components/word-button.tsx';
import { formatDateTime } from '#app/lib/formats.ts';

export interface DecisionDraft {
  optionId: string;
  reason: string;
  reservations: string;
}

/** The decision: to be taken by a manager, or as it was taken. */
export function DecisionBox(props: {
  comparison: Comparison;
  mayDecide: boolean;
  /** futures are being run, so deciding waits */
  working: boolean;
  busy: boolean;
  error: unknown;
  onDecide: (draft: DecisionDraft) => void;
  /** shows the decision as a text with its figures as files */
  onFiles: () => void;
}) {
  const { comparison, mayDecide } = props;
  const { decision, plan, done } = comparison;
  const [draft, setDraft] = useState<DecisionDraft>({ optionId: '', reason: '', reservations: '' });
  const change = (part: Partial<DecisionDraft>) => setDraft({ ...draft, ...part });
  if (decision)
    return (
      <section aria-label="Decision">
        <b>Decision</b>
        <p className="mt-1 text-lead">
          <b>{decision.optionName}</b>
        </p>
        <p className="mt-1 whitespace-pre-wrap">{decision.reason}</p>
        {decision.reservations && (
          <p className="mt-2 whitespace-pre-wrap">
            <b>Reservations:</b> {decision.reservations}
          </p>
        )}
        <p className="mt-2 text-note text-ink-2">
          {decision.decidedBy}, {formatDateTime(decision.decidedAt)}. The comparison is frozen; a copy may go
          on.
        </p>
        <p className="mt-1">
          <WordButton lined onClick={props.onFiles}>
            Text and figures of this decision
          </WordButton>
        </p>
      </section>
    );
  const ready = draft.optionId !== '' && draft.reason.trim() !== '' && done >= 2;
  return (
    <section aria-label="Decision">
      <div className="flex flex-wrap justify-between gap-x-4">
        <b>Decision</b>
        <span className="text-note text-ink-2">for the brief; it freezes this comparison</span>
      </div>
      {!mayDecide ? (
        <p className="mt-1 text-ink-2">
          {props.working
            ? 'Still open. Pause or stop the comparison to decide on what is done.'
            : 'Still open. Managers and admins of the team decide.'}
        </p>
      ) : (
        <form
          aria-label="Record a decision"
          onSubmit={(event) => {
            event.preventDefault();
            if (ready) props.onDecide(draft);
          }}
        >
          <fieldset className="mt-1">
            <legend className="sr-only">Option chosen</legend>
            <div className="flex flex-wrap gap-x-5">
              {plan.options.map(({ optionId, name }) => (
                <label
                  key={optionId}
                  className="inline-flex min-h-7 cursor-pointer items-center gap-2 touch:min-h-11"
                >
                  <input
                    type="radio"
                    name="decision"
                    className="size-4 accent-ink"
                    checked={draft.optionId === optionId}
                    onChange={() => change({ optionId })}
                  />
                  <span className={draft.optionId === optionId ? 'font-bold' : ''}>{name}</span>
                </label>
              ))}
            </div>
          </fieldset>
          <TextAreaField
            label="Reason"
            rows={3}
            maxLength={4000}
            className="mt-1"
            value={draft.reason}
            onChange={(event) => change({ reason: event.target.value })}
          />
          <TextAreaField
            label="Reservations, if any"
            rows={2}
            maxLength={4000}
            className="mt-2"
            value={draft.reservations}
            onChange={(event) => change({ reservations: event.target.value })}
          />
          {props.error ? <ProblemNotice error={props.error} title="Not recorded." className="mt-2" /> : null}
          <div className="mt-2 flex flex-wrap items-center gap-3">
            <Button kind="primary" type="submit" disabled={!ready} busy={props.busy} busyLabel="Recording">
              Record decision
            </Button>
            <span className="text-note text-ink-2">
              {done < 2
                ? 'Two futures of each option at least must be done.'
                : 'A simulation supports a decision; permits, surveys and licensed practice are not replaced by it.'}
            </span>
          </div>
        </form>
      )}
    </section>
  );
}
