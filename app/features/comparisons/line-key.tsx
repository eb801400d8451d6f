import { Chosen } from './chosen.tsx';
import { dashOf, marksAt, widthOf } from './line-styles.ts';

export interface KeyEntry {
  readonly name: string;
  readonly wait: boolean;
}

/** Which line is whose. Pointing at a name, or pressing it, brings its line out; pressing it again lets go. */
export function LineKey(props: {
  entries: readonly KeyEntry[];
  chosen: number | undefined;
  lit: number | undefined;
  onLit: (place: number | undefined) => void;
}) {
  const { entries, chosen, lit, onLit } = props;
  return (
    <ul className="flex flex-wrap gap-x-5 text-note" aria-label="Lines">
      {entries.map(({ name, wait }, i) => (
        <li key={name}>
          <button
            type="button"
            aria-pressed={lit === i}
            className={`flex min-h-7 cursor-pointer items-center gap-2 border-b-2 touch:min-h-11 ${lit === i ? 'border-ink font-bold' : 'border-transparent hover:border-rule'}`}
            onPointerEnter={(event) => event.pointerType === 'mouse' && onLit(i)}
            onPointerLeave={(event) => event.pointerType === 'mouse' && onLit(undefined)}
            onFocus={(event) => event.currentTarget.matches(':focus-visible') && onLit(i)}
            onBlur={() => onLit(undefined)}
            onClick={() => onLit(lit === i ? undefined : i)}
          >
            <svg width={36} height={12} aria-hidden="true">
              <path
                d="M0 6H36"
                className="stroke-ink"
                strokeWidth={widthOf(wait)}
                strokeDasharray={dashOf(i)}
              />
              <path d={marksAt(i, [[18, 6]])} className={wait ? 'fill-ground stroke-ink' : 'fill-ink'} />
            </svg>
            {name}
            {chosen === i && <Chosen />}
          </button>
        </li>
      ))}
    </ul>
  );
}
