import { dashOf, marksAt, widthOf } from './line-styles.ts';

export interface Label {
  readonly x: number;
  readonly y: number;
  readonly text: string;
}

/** Words that can be read across lines. */
export const halo = 'stroke-ground [paint-order:stroke] [stroke-linejoin:round] [stroke-width:4px]';

/** The band and the line of one option, with its marks; pale while another is brought out. */
export function OptionLine(props: {
  place: number;
  wait: boolean;
  lit: number | undefined;
  line: string;
  band: string | undefined;
  /** where its mark stands on the line */
  marked: readonly (readonly [number, number])[];
}) {
  const { place, wait, lit, line, band, marked } = props;
  const away = lit !== undefined && lit !== place;
  return (
    <g opacity={away ? 0.25 : 1}>
      {band && !away && <path d={band} className="fill-shore" opacity={lit === place ? 0.5 : 0.14} />}
      <path
        d={line}
        fill="none"
        className="stroke-ink"
        strokeWidth={widthOf(wait) + (lit === place ? 1.2 : 0)}
        strokeDasharray={dashOf(place)}
      />
      <path
        d={marksAt(place, marked)}
        className={wait ? 'fill-ground stroke-ink' : 'fill-ink stroke-ground'}
        strokeWidth={wait ? 1.2 : 0.8}
      />
    </g>
  );
}

/** Names at the right ends of lines, with a thin leader where one had to move away. */
export function EndLabels(props: {
  labels: readonly (Label & { readonly from: readonly [number, number] })[];
  lit: number | undefined;
  longest: number;
}) {
  return props.labels.map(({ x, y, text, from }, i) => (
    <g key={i} opacity={props.lit !== undefined && props.lit !== i ? 0.35 : 1}>
      <path d={`M${from[0]} ${from[1]}L${x - 3} ${y - 3.5}`} className="stroke-ink-2" strokeWidth={0.8} />
      <text x={x} y={y} className={`fill-ink text-axis ${props.lit === i ? 'font-bold' : ''}`}>
        {text.length > props.longest ? `${text.slice(0, props.longest - 1)}…` : text}
      </text>
    </g>
  ));
}
