import type { Interval } from '#sim-core/index.ts';
import { of100 } from '#sim-core/compare/chance-words.ts';

/** A chance as a rule of 100 futures that can be counted, with its interval above it. The sentence beside it says it too. */
export function HundredRule({ chance }: { chance: Interval }) {
  const filled = of100(chance.estimate);
  const [low, high] = [chance.low * 1000, chance.high * 1000];
  return (
    <svg
      viewBox="0 0 1000 30"
      preserveAspectRatio="none"
      className="block h-[30px] w-full"
      aria-hidden="true"
    >
      <path
        d={`M${low} 1v8M${high} 1v8M${low} 5H${high}`}
        className="stroke-ink"
        vectorEffect="non-scaling-stroke"
        strokeWidth={1.3}
        fill="none"
      />
      {Array.from({ length: 100 }, (_, k) => (
        <rect
          key={k}
          x={k * 10 + 1}
          y={k < filled ? 12 : 21}
          width={7}
          height={k < filled ? 14 : 5}
          className={k < filled ? 'fill-ink' : 'fill-rule'}
        />
      ))}
      <path d="M0 28.500H1000" className="stroke-ink" vectorEffect="non-scaling-stroke" />
      {Array.from({ length: 11 }, (_, k) => (
        <path
          key={k}
          d={`M${Math.min(999, k * 100 + 1)} 28v3`}
          className="stroke-ink"
          vectorEffect="non-scaling-stroke"
        />
      ))}
    </svg>
  );
}
