import type { ReactNode, Ref } from 'react';
import { scaleBar } from './map-ticks.ts';
import { shareOf, type MapRaster } from './map-raster.ts';

export interface MapLegendProps {
  readonly raster?: MapRaster;
  /** whether ground that cannot hold the plant is painted as water */
  readonly water: boolean;
  readonly metresPerPixel: number;
  /** a small map: only what cannot be left out */
  readonly compact: boolean;
  /** the part that is always there, for whoever keeps clear of it */
  readonly standing?: Ref<HTMLDivElement>;
  /** words above the ramp, instead of the usual ones */
  readonly title?: string;
  readonly children?: ReactNode;
}

const mostClasses = 8;

/** What the colours mean, how long a stretch of ground is, and where north is. */
export function MapLegend(props: MapLegendProps) {
  const { raster, water, metresPerPixel, compact, title, standing, children } = props;
  const swatches = (
    <>
      {raster?.kind === 'closing' && (
        <>
          <Swatch colour="var(--color-standing)">stood at the survey</Swatch>
          <Swatch colour={hatch}>open past {raster.lastYear}</Swatch>
        </>
      )}
      {water && <Swatch colour="var(--color-water)">cannot hold the plant</Swatch>}
      {raster?.kind === 'classes' && <ClassSwatches classes={raster.classes} />}
      {children}
    </>
  );
  const ramp = <Ramp raster={raster} title={title} width={compact ? 136 : 170} />;
  const rule = <ScaleRule metresPerPixel={metresPerPixel} room={compact ? 90 : 110} />;
  if (compact)
    return (
      <details className="group pointer-events-auto text-note text-ink">
        <summary className="list-none [&::-webkit-details-marker]:hidden">
          <div ref={standing} className="flex min-h-11 items-end gap-4 px-3 py-1.5">
            {ramp}
            <span className="border-b border-ink">
              <span className="group-open:hidden">Legend</span>
              <span className="hidden group-open:inline">Close</span>
            </span>
          </div>
        </summary>
        <div className="grid gap-y-0.5 border-t border-rule px-3 py-2">
          {swatches}
          {rule}
        </div>
      </details>
    );
  return (
    <div ref={standing} className="flex items-end gap-4 px-4 py-2 text-note text-ink">
      <svg width={12} height={26} aria-label="North is up" role="img" className="shrink-0">
        <path d="M6 26V9M6 1l4.500 9h-9z" stroke="currentColor" fill="currentColor" strokeWidth={1.2} />
      </svg>
      <div className="flex flex-wrap items-end gap-x-5 gap-y-1">
        {ramp}
        <div className="grid grid-flow-col grid-rows-2 gap-x-4 leading-[1.35]">{swatches}</div>
        {rule}
      </div>
    </div>
  );
}

const hatch = 'repeating-linear-gradient(135deg, var(--color-standing) 0 1.5px, var(--color-late) 1.5px 5px)';

function Swatch({ colour, children }: { colour: string; children: ReactNode }) {
  return (
    <span className="flex items-center gap-1.5">
      <span
        aria-hidden="true"
        className="h-2.5 w-3.5 shrink-0 border border-ink"
        style={{ background: colour }}
      />
      {children}
    </span>
  );
}

function ClassSwatches({ classes }: { classes: Extract<MapRaster, { kind: 'classes' }>['classes'] }) {
  const more = classes.length - mostClasses;
  return (
    <>
      {classes.slice(0, mostClasses).map((c) => (
        <Swatch key={c.value} colour={c.colour}>
          <span className="max-w-[20ch] truncate">{c.name}</span>
        </Swatch>
      ))}
      {more > 0 && <span className="text-ink-2">and {more} more</span>}
    </>
  );
}

interface RampProps {
  readonly raster: MapRaster | undefined;
  readonly title: string | undefined;
  readonly width: number;
}

function Ramp({ raster, title, width }: RampProps) {
  if (!raster || raster.kind === 'classes') return null;
  const ramp = raster.kind === 'closing' ? 'closing' : raster.kind === 'difference' ? 'diff' : 'cover';
  const stops = Array.from({ length: 9 }, (_, i) => `var(--color-${ramp}-${i})`);
  const [from, half, to] = endsOf(raster);
  const usual = {
    closing: 'Year the ground closes',
    cover: 'Cover',
    height: 'Height',
    share: 'name' in raster ? raster.name : '',
    difference: 'name' in raster ? raster.name : '',
  }[raster.kind];
  return (
    <div style={{ width }}>
      <div className="font-semibold whitespace-nowrap">{title ?? usual}</div>
      <div
        aria-hidden="true"
        className="my-0.5 h-[9px]"
        style={{ background: `linear-gradient(to right, ${stops.join(', ')})` }}
      />
      <div className="flex justify-between font-mono text-axis font-semibold">
        <span>{from}</span>
        <span>{half}</span>
        <span>{to}</span>
      </div>
    </div>
  );
}

function endsOf(raster: Exclude<MapRaster, { kind: 'classes' }>): (string | number)[] {
  if (raster.kind === 'closing') return [raster.surveyYear + 1, '', raster.lastYear];
  if (raster.kind === 'height') return [raster.lowest.toFixed(2), '', `${raster.highest.toFixed(2)} m`];
  if (raster.kind === 'share' && raster.most) return ['0', '', shareOf(raster, 255)];
  return raster.kind === 'difference' ? ['−100', 'alike', '+100'] : ['0', '50', '100 %'];
}

function ScaleRule({ metresPerPixel, room }: { metresPerPixel: number; room: number }) {
  const { pixels, labels, unit, metres } = scaleBar(metresPerPixel, room);
  const ink = 'var(--color-ink)';
  return (
    <svg
      // As wide as its longest, so that the legend never wraps anew while the map is zoomed.
      width={room + 40}
      height={24}
      role="img"
      aria-label={`This bar is ${metres} m long`}
      className="-ml-1.5 overflow-visible fill-ink font-mono text-axis font-semibold"
    >
      <g transform="translate(6 20)">
        <path d={`M0 0h${pixels / 2}`} stroke={ink} strokeWidth={5} />
        <path
          d={`M${pixels / 2} -2h${pixels / 2}m0 4h-${pixels / 2}M${pixels} -2.500v5`}
          stroke={ink}
          fill="none"
        />
        <text y={-8} textAnchor="middle">
          {labels[0]}
        </text>
        {pixels > 80 && (
          <text x={pixels / 2} y={-8} textAnchor="middle">
            {labels[1]}
          </text>
        )}
        <text x={pixels - labels[2].length * 3.3} y={-8}>
          {labels[2]} {unit}
        </text>
      </g>
    </svg>
  );
}
