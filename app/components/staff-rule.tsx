/** The graduated rule of one step: filled blocks as far as `share`, ticks for the rest. Stretches to its width. */
export function StaffRule(props: { share: number; blocks?: number }) {
  const blocks = props.blocks ?? 20;
  const filled = Math.round(Math.min(1, Math.max(0, props.share)) * blocks);
  const marks = [];
  for (let k = 0; k < blocks; k++) {
    if (k < filled) {
      if (k % 2 === 0) marks.push(<rect key={k} x={k} y={0} width={1} height={8} className="fill-ink" />);
    } else if (k > 0) {
      const top = k % (blocks / 2) === 0 ? 0 : 4;
      marks.push(
        <path
          key={k}
          d={`M${k} ${top}V8`}
          vectorEffect="non-scaling-stroke"
          className="stroke-ink [stroke-opacity:.6]"
        />,
      );
    }
  }
  return (
    <svg
      viewBox={`0 0 ${blocks} 8`}
      preserveAspectRatio="none"
      aria-hidden="true"
      className="block h-2 w-full overflow-visible"
    >
      {marks}
    </svg>
  );
}
