import type { Caution, ComparisonCaution } from '#sim-core/spec/caution.ts';
import { formatCounted } from '#app/lib/formats.ts';

/** A coarse cell is no belief: where nothing else is said, the title names it. */
const titleOf = (cautions: readonly Caution[]): string =>
  cautions.every(({ code }) => code === 'cell-too-coarse')
    ? 'The cells are coarse for this spread'
    : `Belief outruns data in ${formatCounted(cautions.length, 'point')}`;

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
      <summary className="min-h-7 cursor-pointer py-0.5 leading-snug font-semibold touch:min-h-11 touch:py-2.5">
        {titleOf(cautions)}
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
