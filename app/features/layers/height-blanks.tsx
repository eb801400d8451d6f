import { heightUnits, type HeightUnit, type Layer } from '#contract/layers.ts';
import { BlankSelect } from '#app/components/blank.tsx';
import { DatumBlank } from './datum-blank.tsx';
import { heightUnitLabels } from './part-words.ts';

type Vertical = NonNullable<Layer['vertical']>;

/** `[metres] above [datum]`: what heights are counted in, and above what, as blanks in a sentence. */
export function HeightBlanks(props: {
  vertical: Vertical;
  /** ends the blanks' names, where several of them stand on a page: ` of heights.tif` */
  of?: string;
  disabled: boolean;
  onChange: (vertical: Vertical) => void;
}) {
  const { vertical, of = '', onChange } = props;
  return (
    <>
      <BlankSelect
        label={`Unit of the heights${of}`}
        value={vertical.unit}
        disabled={props.disabled}
        onChange={(event) => onChange({ ...vertical, unit: event.target.value as HeightUnit })}
      >
        {heightUnits.map((unit) => (
          <option key={unit} value={unit}>
            {heightUnitLabels[unit]}
          </option>
        ))}
      </BlankSelect>{' '}
      above{' '}
      <DatumBlank
        key={vertical.datum}
        label={`Vertical datum${of}`}
        datum={vertical.datum}
        onDatum={(datum) => onChange({ ...vertical, datum })}
      />
    </>
  );
}
