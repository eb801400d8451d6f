import { useMutation, useQueryClient } from '@tanstack/react-query';
import { valueUnits, type Layer, type ValueUnit } from '#contract/layers.ts';
import { BlankSelect } from '#app/components/blank.tsx';
import { ProblemNotice } from '#app/components/notice.tsx';
import { changeLayerMutation } from './change-layer.ts';
import { HeightBlanks } from './height-blanks.tsx';
import { heightUnitLabels, unitLabels } from './part-words.ts';

/** What the values of a layer of shares are, as a blank in a sentence. The server guessed it from the values. */
export function UnitChoice(props: { siteId: string; layer: Layer; editable: boolean }) {
  const { layer, siteId } = props;
  const queryClient = useQueryClient();
  const change = useMutation(changeLayerMutation(queryClient, siteId, layer.id));
  if (!props.editable) return <p>The values are {unitLabels[layer.unit]}.</p>;
  return (
    <>
      <p>
        The values are{' '}
        <BlankSelect
          label={`What the values of ${layer.part} are`}
          value={change.isPending ? change.variables.unit : layer.unit}
          disabled={change.isPending}
          onChange={(event) => change.mutate({ unit: event.target.value as ValueUnit })}
        >
          {valueUnits.map((unit) => (
            <option key={unit} value={unit}>
              {unitLabels[unit]}
            </option>
          ))}
        </BlankSelect>
        .
      </p>
      {change.error && <ProblemNotice error={change.error} className="mt-1" />}
    </>
  );
}

/** What the heights of elevation are counted in, and above what. */
export function HeightChoice(props: { siteId: string; layer: Layer; editable: boolean }) {
  const { layer, siteId } = props;
  const queryClient = useQueryClient();
  const change = useMutation(changeLayerMutation(queryClient, siteId, layer.id));
  const vertical = layer.vertical ?? { datum: '', unit: 'metre' };
  if (!props.editable)
    return (
      <p>
        Heights in {heightUnitLabels[vertical.unit]} above {vertical.datum || 'a datum that nobody has named'}
        .
      </p>
    );
  return (
    <>
      <p className="leading-7">
        Heights in{' '}
        <HeightBlanks
          vertical={vertical}
          disabled={change.isPending}
          onChange={(next) => change.mutate({ vertical: next })}
        />
        .
      </p>
      {change.error && <ProblemNotice error={change.error} className="mt-1" />}
    </>
  );
}
