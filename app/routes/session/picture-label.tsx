import { pictureGrid } from './picture-ground.ts';

const lineHeight = 8;

/** Words on the picture, tied to their place by a leader line. Left out where the picture is too small to read them. */
export function PictureLabel(props: { at: { column: number; row: number }; lines: readonly string[] }) {
  const { column, row } = props.at;
  const width = Math.max(...props.lines.map((line) => line.length)) * 3.15 + 9;
  const height = props.lines.length * lineHeight + 5;
  // Beside the place it stands for, on the side where there is room.
  const left = Math.min(Math.max(6, column - width / 2), pictureGrid.width - width - 4);
  const top = row > 80 ? row - 52 : row + 30;
  const from = { x: left + width * 0.4, y: top > row ? top : top + height };
  const to = { x: column + 0.5, y: row + (top > row ? 4 : -6) };
  const leader = `M${from.x} ${from.y}L${to.x} ${to.y}`;
  return (
    <g className="max-lg:hidden">
      <path d={leader} strokeWidth="1.7" className="stroke-halo" />
      <path d={leader} strokeWidth="0.5" className="stroke-ink" />
      <rect x={left} y={top} width={width} height={height} className="fill-ground" />
      {props.lines.map((line, i) => (
        <text
          key={line}
          x={left + 4.5}
          y={top + 7.5 + i * lineHeight}
          fontSize="6.25"
          className={i === 0 ? 'fill-ink font-semibold' : 'fill-ink-2'}
        >
          {line}
        </text>
      ))}
    </g>
  );
}
