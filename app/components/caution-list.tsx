import type { Caution, ComparisonCaution } from '#sim-core/spec/caution.ts';
import { formatCounted } from '#app/lib/formats.ts';

/** Where belief outruns data, folded to its count until somebody opens it; nothing where there is nothing to say. */
export function CautionList(props: {
  cautions: readonly (Caution | ComparisonCaution)[];
  /** `when it was started`: what the cautions were found on */
  found?: string;
  open?: boolean;
}) {
  const { cautions, found } = props;
  if (cautions.length === 0) return null;
  return (
    <details open={props.open} className="border-l-[6px] border-ink pl-3 text-[13.5px]">
      <summary className="min-h-7 cursor-pointer leading-7 font-semibold touch:min-h-11 touch:leading-[44px]">
        Belief outruns data in {formatCounted(cautions.length, 'point')}
        {found && <span className="font-normal text-ink-2">, {found}</span>}
      </summary>
      <ul className="pb-1">
        {cautions.map((caution) => (
          <li key={caution.message} className="border-t border-rule-2 py-1 text-note">
            {'outlooks' in caution && caution.outlooks.length > 0 && <b>{caution.outlooks.join(', ')}: </b>}
            {caution.message}
          </li>
        ))}
      </ul>
    </details>
  );
}
