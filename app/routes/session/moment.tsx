import { useMemo, type ReactNode } from 'react';
import { RasterPicture } from '#app/components/raster-picture.tsx';
import { classNames } from '#app/lib/class-names.ts';
import { pictureGrid, planned, survivors } from './picture-ground.ts';

const { width, height } = pictureGrid;

/** The picture's ground at the end of one year, with its footholds. While the run is on its way there it grows. */
export function Moment(props: {
  year: number;
  words: string;
  frame: Uint8Array;
  /** the run has not reached the moment yet */
  growing: boolean;
  children?: ReactNode;
}) {
  const raster = useMemo(() => ({ kind: 'cover' as const, values: props.frame }), [props.frame]);
  return (
    <div className="relative min-w-0 flex-1 overflow-hidden border-ink bg-sheet not-first:border-l">
      <RasterPicture
        raster={raster}
        width={width}
        height={height}
        className="absolute inset-0 size-full object-cover [image-rendering:pixelated]"
      />
      <Footholds>{props.children}</Footholds>
      <p
        className={classNames(
          'absolute bottom-0 left-0 border-t border-r border-ink bg-ground px-3.5 py-1.5 text-note leading-tight text-ink-2',
          props.growing && 'busy-ticks',
        )}
      >
        <b className="block text-title leading-tight font-strong text-ink">{props.year}</b>
        {props.words}
      </p>
    </div>
  );
}

function Footholds(props: { children?: ReactNode }) {
  return (
    <svg
      viewBox={`0 0 ${width} ${height}`}
      preserveAspectRatio="xMidYMid slice"
      aria-hidden="true"
      className="absolute inset-0 size-full"
    >
      {survivors.map(({ column, row }) => (
        <path
          key={`${column} ${row}`}
          d={`M${column + 0.5} ${row - 1.7}l2.2 2.2-2.2 2.2-2.2-2.2z`}
          strokeWidth="0.7"
          className="fill-halo stroke-ink"
        />
      ))}
      {planned.map(({ column, row }) => (
        <g key={`${column} ${row}`} transform={`translate(${column + 0.5} ${row + 0.5}) scale(.58)`}>
          <path
            d="M0 0V-12.500M0-12.500h8.500v5.600h-8.500"
            strokeWidth="4"
            strokeLinejoin="round"
            className="fill-none stroke-halo"
          />
          <path d="M0-12.600h8.600v6H0z" className="fill-flag" />
          <path d="M0 0V-13" strokeWidth="1.5" className="stroke-ink" />
          <circle r="1.7" className="fill-ink" />
        </g>
      ))}
      {props.children}
    </svg>
  );
}
