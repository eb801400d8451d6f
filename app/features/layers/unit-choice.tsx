import { useMutation, useQueryClient } from '@tanstack/react-query';
import { valueUnits, type Layer, type ValueUnit } from '#contract/layers.ts';
import { BlankSelect } from '#app/components/blank.tsx';
import { ProblemNotice } from '#app/components/notice.tsx';
import { changeUnitMutation } from './change-layer.ts';
import { unitLabels } from './part-words.ts';

/** What the values of cover or refuge are, as a blank in a sentence. The server guessed it from the values. */
export function UnitChoice(props: { siteId: string; layer: Layer; editable: boolean }) {
  const { layer, siteId } = props;
  const queryClient = useQueryClient();
  const change = useMutation(changeUnitMutation(queryClient, siteId, layer.id));
  if (!props.editable) return <p>The values are {unitLabels[layer.unit]}.</p>;
  return (
    <>
      <p>
        The values are{' '}
        <BlankSelect
          label={`What the values of ${layer.part} are`}
          value={change.isPending ? change.variables : layer.unit}
          disabled={change.isPending}
          onChange={(event) => change.mutate(event.target.value as ValueUnit)}
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
