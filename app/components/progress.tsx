import { formatDuration } from '#app/lib/formats.ts';
import { classNames } from '#app/lib/class-names.ts';

const marks = 100;

/** How far a long job is, as a rule of marks that fill, with the time left in words. */
export function Progress(props: {
  /** what is counted: `year 12 of 34`, `1.4 of 9 MB` */
  label: string;
  done: number;
  of: number;
  /** s; left out while it cannot be told */
  secondsLeft?: number;
  /** what becomes of the work when it is cancelled */
  note?: string;
  className?: string;
}) {
  const share = props.of > 0 ? Math.min(1, props.done / props.of) : 0;
  const left = props.secondsLeft === undefined ? undefined : `${formatDuration(props.secondsLeft)} left`;
  const words = [left, props.note].filter((part) => part !== undefined).join('; ');
  const filled = Math.floor(share * marks);
  return (
    <div
      role="progressbar"
      aria-label={props.label}
      aria-valuemin={0}
      aria-valuemax={100}
      aria-valuenow={Math.round(share * 100)}
      aria-valuetext={[props.label, words].filter(Boolean).join(', ')}
      className={props.className}
    >
      <div className="mb-2 flex flex-wrap justify-between gap-x-4 text-note">
        <span className="font-semibold">{props.label}</span>
        <span className="text-ink-2">{words}</span>
      </div>
      <svg
        viewBox="0 0 1000 15"
        preserveAspectRatio="none"
        aria-hidden="true"
        className="block h-[15px] w-full"
      >
        {Array.from({ length: marks }, (_, k) => (
          <rect
            key={k}
            x={k * 10}
            y={k < filled ? 0 : 9}
            width={7}
            height={k < filled ? 13 : 4}
            className={classNames(k < filled ? 'fill-ink' : 'fill-rule')}
          />
        ))}
        <path d="M0 14.5H1000" vectorEffect="non-scaling-stroke" className="stroke-ink" />
      </svg>
    </div>
  );
}
