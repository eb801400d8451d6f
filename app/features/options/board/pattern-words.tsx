import type { LaidPoints } from '#sim-core/plan/pattern.ts';
import { Button } from '#app/components/button.tsx';
import { WordButton } from '#app/components/word-button.tsx';
import { formatArea, formatCounted } from '#app/lib/formats.ts';

/** What a pattern comes to before it is placed, and the way to place it or to lay it anew. */
export function PatternWords(props: {
  laid: LaidPoints | undefined;
  /** what one point is: `mound` or `clump` */
  thing: 'mound' | 'clump';
  busy: boolean;
  /** chance plays a part, so that laying it again gives other places */
  chance: boolean;
  /** it takes the place of works that were laid before */
  again: boolean;
  onPlace: () => void;
  onLayAgain: () => void;
}) {
  const { laid, thing } = props;
  const count = laid?.points.length ?? 0;
  return (
    <p className="flex min-h-7 flex-wrap items-center gap-x-3 gap-y-1 text-[13.5px]">
      {count > 0 && (
        <Button busy={props.busy} onClick={props.onPlace} className="min-h-7 px-2.5">
          {props.again ? 'Lay them anew:' : 'Place'} {formatCounted(count, thing)}
        </Button>
      )}
      {props.chance && count > 0 && (
        <WordButton lined onClick={props.onLayAgain}>
          Other places
        </WordButton>
      )}
      <span role="status" className="text-ink-2">
        {laid === undefined
          ? 'Working out the places'
          : (laid.short ??
            `${formatCounted(count, thing)} shown faint on ${formatArea(laid.openArea)} of open ground; not placed yet.`)}
      </span>
    </p>
  );
}
