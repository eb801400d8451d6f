import type { ReactNode } from 'react';
import { Blank, BlankSelect } from '#app/components/blank.tsx';
import { WordButton } from '#app/components/word-button.tsx';
import { formatNumber } from '#app/lib/formats.ts';
import { parseNumber } from '#app/lib/parse-number.ts';
import { changesErrors, newLoss, type ChangesDraft, type LossDraft } from './changes-draft.ts';

/** What this outlook changes besides its weather: a trend, losses that come whatever is done, and grazing. */
export function ChangesSection(props: {
  draft: ChangesDraft;
  onChange: (change: Partial<ChangesDraft>) => void;
  editable: boolean;
  /** whether droughts of their own are drawn, so that they can come more often */
  renews: boolean;
  firstYear: number;
  years: number;
  /** whether the plant names grazers */
  plantGrazed: boolean;
}) {
  const { draft, editable, firstYear, years, onChange } = props;
  const errors = changesErrors(draft);
  const shift = parseNumber(draft.shiftPerDecade) ?? 0;
  const blank = (name: 'shiftPerDecade' | 'frequencyPerDecade', label: string) => (
    <Blank
      label={label}
      inputMode="decimal"
      characters={5}
      value={draft[name]}
      disabled={!editable}
      onChange={(event) => onChange({ [name]: event.target.value })}
    />
  );
  const change = (key: number, part: Partial<LossDraft>) =>
    onChange({ losses: draft.losses.map((loss) => (loss.key === key ? { ...loss, ...part } : loss)) });
  return (
    <section aria-labelledby="outlook-changes" className="mb-4 border-t border-rule pt-3 text-[13.5px]">
      <h2 id="outlook-changes" className="text-lead">
        What changes
      </h2>
      <p className="mt-1 leading-[2]">
        Each decade shifts the index by{' '}
        {blank('shiftPerDecade', 'Index units that each decade shifts the weather by')}
        {props.renews && (
          <>
            , and droughts begin{' '}
            {blank('frequencyPerDecade', 'How many times as often droughts begin after each decade')} times as
            often as a decade before
          </>
        )}
        .
      </p>
      {shift !== 0 && (
        <p className="text-note text-ink-2">
          By {firstYear + years - 1} every year is {formatNumber(Math.abs((shift * years) / 10))}{' '}
          {shift < 0 ? 'drier' : 'wetter'}. A trend is an assumption, and said as one wherever results show.
        </p>
      )}
      <h3 className="mt-2 font-semibold">Losses that come under every option</h3>
      {draft.losses.length === 0 && (
        <p className="text-note text-ink-2">
          None. A storm, a spill or an ice winter goes here; a loss that only one option brings belongs to
          that option.
        </p>
      )}
      <ol className="list-decimal pl-5">
        {draft.losses.map((loss, i) => (
          <LossRow
            key={loss.key}
            loss={loss}
            number={i + 1}
            editable={editable}
            onChange={(part) => change(loss.key, part)}
            onRemove={() => onChange({ losses: draft.losses.filter(({ key }) => key !== loss.key) })}
          />
        ))}
      </ol>
      {editable && draft.losses.length < 50 && (
        <WordButton
          lined
          onClick={() => onChange({ losses: [...draft.losses, newLoss(draft.losses, firstYear)] })}
        >
          Expect a loss
        </WordButton>
      )}
      <label className="mt-2 flex min-h-7 cursor-pointer items-center gap-2 touch:min-h-11">
        <input
          type="checkbox"
          className="size-4 accent-ink"
          checked={draft.grazing}
          disabled={!editable}
          onChange={(event) => onChange({ grazing: event.target.checked })}
        />
        <span>Grazers come, as the plant says</span>
      </label>
      {!props.plantGrazed && (
        <p className="text-note text-ink-2">The plant names no grazers, so this changes nothing now.</p>
      )}
      {errors.length > 0 && (
        <p role="alert" className="text-note text-danger">
          {errors.join('. ')}.
        </p>
      )}
    </section>
  );
}

type LossBlank = 'from' | 'until' | 'chance' | 'share' | 'x' | 'y' | 'radius';

function LossRow(props: {
  loss: LossDraft;
  number: number;
  editable: boolean;
  onChange: (part: Partial<LossDraft>) => void;
  onRemove: () => void;
}) {
  const { loss, number, editable, onChange } = props;
  const blank = (name: LossBlank, label: string, characters = 5): ReactNode => (
    <Blank
      label={`${label} of loss ${number}`}
      inputMode="decimal"
      characters={characters}
      value={loss[name]}
      disabled={!editable}
      onChange={(event) => onChange({ [name]: event.target.value })}
    />
  );
  const choice = <K extends 'comes' | 'where'>(name: K, label: string, values: readonly LossDraft[K][]) => (
    <BlankSelect
      label={`${label} of loss ${number}`}
      value={loss[name]}
      disabled={!editable}
      onChange={(event) => onChange({ [name]: event.target.value })}
    >
      {values.map((value) => (
        <option key={value} value={value}>
          {value}
        </option>
      ))}
    </BlankSelect>
  );
  const places: LossDraft['where'][] = [
    'the whole site',
    'a disc',
    ...(loss.outline ? (['an outline'] as const) : []),
  ];
  return (
    <li className="leading-[2]">
      {blank('share', 'Share of the cover, per cent,', 4)} % of the cover goes{' '}
      {choice('comes', 'Coming', ['in a year', 'by chance'])}
      {loss.comes === 'in a year' ? (
        <>, {blank('from', 'Year')}</>
      ) : (
        <>
          , {blank('chance', 'Chance a year, per cent,', 4)} % in each year from {blank('from', 'First year')}{' '}
          to {blank('until', 'Last year')} (empty: the horizon’s)
        </>
      )}
      , on {choice('where', 'Place', places)}
      {loss.where === 'a disc' && (
        <>
          {' '}
          of {blank('radius', 'Radius in metres')} m around {blank('x', 'Easting', 9)} /{' '}
          {blank('y', 'Northing', 9)} (in the site’s coordinates)
        </>
      )}
      .{' '}
      {editable && (
        <WordButton lined aria-label={`Take loss ${number} out`} onClick={props.onRemove}>
          Take it out
        </WordButton>
      )}
    </li>
  );
}
