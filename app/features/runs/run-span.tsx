/** A run as a short rule of years: stored years filled, the year of recovery as a mark. The words beside it say the same. */
export function RunSpan(props: {
  surveyYear: number;
  years: number;
  stored: number;
  recoveredYear: number | null;
}) {
  const { surveyYear, years, stored, recoveredYear } = props;
  const width = 170;
  const x = (n: number) => (n / years) * width;
  const done = x(Math.max(0, Math.min(years, stored - 1)));
  const decades = Array.from({ length: years + 1 }, (_, i) => surveyYear + i).filter((y) => y % 10 === 0);
  return (
    <svg width={width + 8} height={20} aria-hidden="true" className="block max-w-full overflow-visible">
      <g transform="translate(4 12.500)">
        <path d={`M0 0H${width}`} className="stroke-rule" />
        <path d={`M0 -4V4M${width} -4V4`} className="stroke-ink-3" />
        {decades.map((y) => (
          <path key={y} d={`M${x(y - surveyYear)} 0V4`} className="stroke-ink-3" />
        ))}
        {done > 0 && <path d={`M0 0H${done}`} strokeWidth={4} className="stroke-ink" />}
        {recoveredYear !== null && (
          <path d={`M${x(recoveredYear - surveyYear)} -11V6`} strokeWidth={2.5} className="stroke-ink" />
        )}
      </g>
    </svg>
  );
}
