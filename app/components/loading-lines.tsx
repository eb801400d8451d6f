/** Content that is on its way: rules where its lines will stand, and words for those who do not see them. */
export function LoadingLines(props: { label: string; lines?: number }) {
  return (
    <div role="status" className="py-1">
      <span className="text-note text-ink-2">{props.label}</span>
      {Array.from({ length: props.lines ?? 3 }, (_, i) => (
        <div key={i} aria-hidden="true" className="h-7 border-b border-rule-2 text-rule busy-ticks" />
      ))}
    </div>
  );
}
