import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useState, type FormEvent } from 'react';
import { currencyCodes, type SiteCosts } from '#contract/costs.ts';
import type { UnitCosts } from '#sim-core/spec/unit-costs.ts';
import { Blank, BlankSelect } from '#app/components/blank.tsx';
import { Button } from '#app/components/button.tsx';
import { Dialog, DialogActions } from '#app/components/dialog.tsx';
import { ProblemNotice } from '#app/components/notice.tsx';
import { sayDone } from '#app/components/toast.tsx';
import { formatDateTime } from '#app/lib/formats.ts';
import { draftOfCosts, readCosts } from './costs-draft.ts';
import { setCostsMutation } from './site-costs.ts';

const currencyNames = new Intl.DisplayNames('en-GB', { type: 'currency' });

/** What works cost on the site, and the budget, as blanks in sentences. */
export function CostsDialog(props: { siteId: string; set: SiteCosts; onClose: () => void }) {
  const { changedAt, changedBy } = props.set;
  const queryClient = useQueryClient();
  const setCosts = useMutation(setCostsMutation(queryClient, props.siteId));
  const [draft, setDraft] = useState(() => draftOfCosts(props.set.costs));
  const { costs, errors = {} } = readCosts(draft);
  const blank = (field: keyof UnitCosts, label: string) => (
    <Blank
      label={label}
      inputMode="decimal"
      value={draft[field]}
      error={errors[field]}
      onChange={(event) => setDraft({ ...draft, [field]: event.target.value })}
    />
  );
  const submit = (event: FormEvent) => {
    event.preventDefault();
    if (costs)
      setCosts.mutate(costs, {
        onSuccess: () => {
          sayDone('Costs saved');
          props.onClose();
        },
      });
  };
  return (
    <Dialog
      open
      onOpenChange={(open) => {
        if (!open) props.onClose();
      }}
      title="Costs and budget"
      description="For all options of this site. Prices are local: nothing is filled in for you."
    >
      <form onSubmit={submit} noValidate className="mt-3 grid gap-y-2 text-[15px] leading-8">
        <p>
          A mound costs {blank('mound', 'Cost of a mound')}, a planted clump{' '}
          {blank('clump', 'Cost of a planted clump')} and a metre of fence{' '}
          {blank('fenceMetre', 'Cost of a metre of fence')}, in{' '}
          <BlankSelect
            label="Currency"
            className="max-w-full"
            value={draft.currency}
            onChange={(event) => setDraft({ ...draft, currency: event.target.value })}
          >
            {currencyCodes.map((code) => (
              <option key={code} value={code}>
                {code}, {currencyNames.of(code)}
              </option>
            ))}
          </BlankSelect>
          .
        </p>
        <p>
          The crew comes {blank('visitsPerYear', 'Visits in each year with works')} times in each year that
          has works, at {blank('visit', 'Cost of a visit')} a visit. An option with works costs{' '}
          {blank('perYear', 'Fixed cost of every year')} more every year to the horizon, such as watching over
          the works; Wait, which has none, costs nothing.
        </p>
        <p>
          There is {blank('budget', 'Budget, empty where there is none')} to spend in all; leave it empty
          where there is no budget. What is put off weighs{' '}
          {blank('discountRate', 'Discount rate, per cent a year')} % less for each year.
        </p>
        {Object.keys(errors).length > 0 && (
          <ul role="alert" className="text-note text-danger">
            {Object.entries(errors).map(([field, message]) => (
              <li key={field}>{message}</li>
            ))}
          </ul>
        )}
        <p className="text-note text-ink-2">
          {changedAt === null
            ? 'Nobody has set them yet, so options show no amounts.'
            : `Set by ${changedBy} on ${formatDateTime(changedAt)}.`}
        </p>
        {setCosts.error ? <ProblemNotice error={setCosts.error} title="Not saved." /> : null}
        <DialogActions>
          <Button type="submit" busy={setCosts.isPending} disabled={!costs}>
            Save the costs
          </Button>
          <Button onClick={props.onClose}>Cancel</Button>
        </DialogActions>
      </form>
    </Dialog>
  );
}
