import { Blank } from '#app/components/blank.tsx';
import type { MoundPen, PenErrors, PenField } from './mound-pen.ts';

/** What a click on the map places, as blanks in a sentence. */
export function MoundSentence(props: {
  pen: MoundPen;
  errors: PenErrors;
  /** clicks on the map that placed nothing, since the sentence was last written on */
  missed: number;
  onChange: (pen: MoundPen) => void;
}) {
  const { pen, errors, missed, onChange } = props;
  const blank = (field: PenField, label: string) => (
    <Blank
      label={label}
      error={errors[field]}
      inputMode="decimal"
      value={pen[field]}
      onChange={(event) => onChange({ ...pen, [field]: event.target.value })}
    />
  );
  const wrong = Object.values(errors);
  // The alert is keyed by the click: another click is said again, although the words are the same.
  return (
    <div className="text-[13.5px]">
      <p className="flex flex-wrap items-baseline gap-x-1.5 gap-y-1">
        <span>A click places a mound</span> {blank('radius', 'Radius of a mound, m')}
        <span>m in radius, at</span> {blank('strength', 'Strength of a mound, per cent of full')}
        <span>% of full strength, fading over</span> {blank('halo', 'Width of the fading edge, m')}
        <span>m, in</span> {blank('year', 'Year in which it is placed')}
      </p>
      {wrong.length > 0 && (
        <p key={missed} role="alert" className="mt-0.5 text-note text-danger">
          {missed > 0 && <b>Nothing was placed. </b>}
          {wrong.join(' ')}
        </p>
      )}
    </div>
  );
}
