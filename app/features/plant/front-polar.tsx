import { ReadAsTable } from '#app/components/read-as-table.tsx';
import { formatNumber, formatShare } from '#app/lib/formats.ts';
import type { ImpliedDraws } from './implied-draws.ts';

const [size, middle, reach] = [190, 84, 78];

type Speeds = NonNullable<ImpliedDraws['speeds']>;

/** Speeds between a row and the diagonal, mirrored to the whole circle: degrees and m/yr, in order. */
function wholeCircle(speeds: Speeds, of: 'low' | 'middle' | 'high'): [number, number][] {
  const eighth = speeds.map(({ degrees, speed }) => [degrees, speed[of]] as [number, number]);
  const quarter = [
    ...eighth,
    ...eighth
      .slice(0, -1)
      .reverse()
      .map(([d, v]) => [90 - d, v] as [number, number]),
  ];
  return [0, 90, 180, 270].flatMap((turn) =>
    quarter.slice(0, -1).map(([d, v]) => [d + turn, v] as [number, number]),
  );
}

/** How fast an edge moves by the direction that it faces: a circle where the cells do not show. */
export function FrontPolar({ speeds, uncertain }: { speeds: Speeds; uncertain: boolean }) {
  const fastest = Math.max(...speeds.map(({ speed }) => speed.high));
  const path = (of: 'low' | 'middle' | 'high') =>
    `${wholeCircle(speeds, of)
      .map(([degrees, speed], i) => {
        const angle = (degrees / 180) * Math.PI;
        const r = (speed / fastest) * reach;
        return `${i === 0 ? 'M' : 'L'}${(middle + r * Math.cos(angle)).toFixed(1)} ${(middle - r * Math.sin(angle)).toFixed(1)}`;
      })
      .join('')}Z`;
  const [straight, diagonal] = [speeds[0].speed, speeds[speeds.length - 1].speed];
  const words =
    `${uncertain ? 'In the middle of the draws, an' : 'An'} edge that faces along rows moves ${formatNumber(straight.middle, 3)} m a year, one that faces the diagonal ` +
    `${formatNumber(diagonal.middle, 3)} (${formatShare(diagonal.middle / straight.middle)})` +
    (uncertain
      ? `; nine tenths of the draws lie between ${formatNumber(straight.low, 3)} and ${formatNumber(straight.high, 3)} along rows.`
      : '.');
  return (
    <figure>
      <svg
        viewBox={`0 0 ${2 * middle} ${size}`}
        role="img"
        aria-label={words}
        className="mx-auto block w-[176px]"
      >
        <path
          d={`M${middle - reach} ${middle}H${middle + reach}M${middle} ${middle - reach}V${middle + reach}`}
          className="stroke-rule-2"
        />
        {uncertain && (
          <path d={`${path('high')}${path('low')}`} fillRule="evenodd" className="fill-shore opacity-60" />
        )}
        <path d={path('middle')} strokeWidth={2} className="fill-none stroke-ink" />
        <circle cx={middle} cy={middle} r={2} className="fill-ink" />
        <g className="fill-ink-2 font-mono text-axis">
          <text x={middle} y={size - 10} textAnchor="middle">
            outermost: {formatNumber(fastest, 2)} m/yr
          </text>
        </g>
      </svg>
      <figcaption className="text-note text-ink-2">{words}</figcaption>
      <ReadAsTable
        caption="Speed of an edge by the direction it faces, m a year"
        heads={uncertain ? ['direction', '5 %', 'middle', '95 %'] : ['direction', 'speed']}
        rows={speeds.map(({ degrees, speed }) => [
          `${formatNumber(degrees)}° from the rows`,
          ...(uncertain ? [formatNumber(speed.low, 3)] : []),
          formatNumber(speed.middle, 3),
          ...(uncertain ? [formatNumber(speed.high, 3)] : []),
        ])}
      />
    </figure>
  );
}
