/** The marks of the map, small enough to stand in a line of text. Each stands beside its word, so none is read out. */
const inLine = 'inline-block overflow-visible align-[-3px]';

/** A planned mound: the pin flag, the one thing that is coral. */
export function FlagSymbol() {
  return (
    <svg width="14" height="16" aria-hidden="true" className={inLine}>
      <path d="M4 2.4h8.6v6H4z" className="fill-flag" />
      <path d="M4 16V2" strokeWidth="1.5" className="stroke-ink" />
      <circle cx="4" cy="15" r="1.7" className="fill-ink" />
    </svg>
  );
}

/** A foothold that was there: a survivor on an old mound. */
export function SurvivorSymbol() {
  return (
    <svg width="14" height="16" aria-hidden="true" className={inLine}>
      <path d="M7 3.4L11.6 8 7 12.6 2.4 8z" strokeWidth="1.4" className="fill-halo stroke-ink" />
    </svg>
  );
}

/** A planting: one tick is one clump of plants. */
export function PlantingSymbol() {
  return (
    <svg width="14" height="16" aria-hidden="true" className={inLine}>
      <path d="M7 15V6M3 8.2L7 13l4-4.800" strokeWidth="2" className="fill-none stroke-flag" />
    </svg>
  );
}

/** A fence: the dashed line of its outline. */
export function FenceSymbol() {
  return (
    <svg width="14" height="16" aria-hidden="true" className={inLine}>
      <path d="M0 9h14" strokeWidth="1.8" strokeDasharray="4 2" className="fill-none stroke-ink" />
    </svg>
  );
}

/** A loss that is expected: a dotted ring with a cross. */
export function LossSymbol() {
  return (
    <svg width="14" height="16" aria-hidden="true" className={inLine}>
      <g strokeWidth="1.3" className="fill-none stroke-ink">
        <circle cx="7" cy="9" r="6" strokeDasharray="2 2" />
        <path d="M4.500 6.500l5 5m0-5l-5 5" />
      </g>
    </svg>
  );
}
