import { withoutPlanted } from '#contract/work-titles.ts';
import type { Work } from '#contract/works.ts';
import { Button } from '#app/components/button.tsx';
import { WordButton } from '#app/components/word-button.tsx';
import { formatArea, formatCounted } from '#app/lib/formats.ts';
import type { Laying } from './use-laying.ts';

/** What a pattern's works are: `40 mounds`, `200 clumps`. */
export function laidInWords(works: readonly Work[]): string {
  const things = withoutPlanted(works);
  const mounds = things.filter((work) => work.kind === 'mound').length;
  const clumps = things.reduce((sum, work) => sum + (work.kind === 'clumps' ? work.points.length : 0), 0);
  return [mounds > 0 && formatCounted(mounds, 'mound'), clumps > 0 && formatCounted(clumps, 'clump')]
    .filter(Boolean)
    .join(' and ');
}

/** Whether something is shown faint that is to be placed or dropped. */
export const isShown = (laying: Laying): boolean => laying.works.length > 0 || laying.parked.length > 0;

/** What a pattern comes to before it is placed, and the ways on: place it, lay it anew, drop it. */
export function PlaceBar(props: {
  laying: Laying;
  /** a pattern's tool is in use */
  inUse: boolean;
  /** what is typed makes sense */
  sound: boolean;
  onDrop: () => void;
}) {
  const { laying, inUse, sound } = props;
  const { laid, works, parked } = laying;
  if (inUse && sound && laying.ready && !laying.needsSketch && !laying.error) {
    return (
      <>
        {works.length > 0 && (
          <Button kind="primary" busy={laying.busy} onClick={laying.place}>
            {laying.again ? 'Lay them anew:' : 'Place'} {laidInWords(works)}
          </Button>
        )}
        {works.length > 0 && laying.chance && (
          <WordButton lined onClick={laying.layAgain}>
            Other places
          </WordButton>
        )}
        {works.length > 0 && (
          <WordButton lined onClick={props.onDrop}>
            Drop
          </WordButton>
        )}
        <span role="status" className="text-note text-ink-2">
          {laid === undefined
            ? 'Working out the places'
            : (laid.short ?? `Shown faint on ${formatArea(laid.openArea)} of open ground; not placed yet.`)}
          <span className="touch:hidden"> Enter on the map places, Escape drops.</span>
        </span>
      </>
    );
  }
  if (parked.length === 0) return null;
  return (
    <>
      <Button kind="primary" onClick={laying.placeParked}>
        Place {laidInWords(parked)}
      </Button>
      <WordButton lined onClick={laying.dropParked}>
        Drop
      </WordButton>
      <span role="status" className="text-note text-ink-2">
        Still shown faint; not placed yet.
      </span>
    </>
  );
}
