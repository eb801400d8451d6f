import { curvePoints } from '#sim-core/spec/layer-source.ts';
import { NumberBlank } from '#app/components/number-blank.tsx';
import { Table } from '#app/components/table.tsx';
import { WordButton } from '#app/components/word-button.tsx';
import type { ElevationCurve } from '#contract/layers.ts';
import type { CurveName, ElevationEvent } from './curve-draft.ts';

/** The points of a curve in numbers. */
export function CurveTable(props: {
  name: CurveName;
  curve: ElevationCurve;
  editable: boolean;
  tell: (event: ElevationEvent) => void;
}) {
  const { name, curve, editable, tell } = props;
  const rows = curve.map(([height, share], point) => ({ height, share, point }));
  const move = (point: number, change: { height?: number; share?: number }) => {
    const [height, share] = curve[point];
    tell({ type: 'moved', curve: name, point, height, share, ...change, gesture: `type ${name} ${point}` });
  };
  return (
    <Table
      caption={`Points of ${name}`}
      rows={rows}
      rowKey={({ point }) => String(point)}
      columns={[
        {
          key: 'height',
          head: 'height, m',
          number: true,
          cell: ({ height, point }) =>
            editable ? (
              <NumberBlank
                label={`Height of point ${point + 1} of ${name}, m`}
                value={height}
                // Between its neighbours, so that what is typed is what stands.
                least={point > 0 ? Math.round(curve[point - 1][0] * 100 + 1) / 100 : -12_000}
                most={point < curve.length - 1 ? Math.round(curve[point + 1][0] * 100 - 1) / 100 : 9000}
                characters={6}
                onValue={(value) => move(point, { height: value })}
              />
            ) : (
              height
            ),
        },
        {
          key: 'share',
          head: 'share',
          number: true,
          cell: ({ share, point }) =>
            editable ? (
              <NumberBlank
                label={`Share at point ${point + 1} of ${name}`}
                value={share}
                least={0}
                most={1}
                characters={4}
                onValue={(value) => move(point, { share: value })}
              />
            ) : (
              share
            ),
        },
        ...(editable
          ? [
              {
                key: 'remove',
                head: <span className="sr-only">Remove</span>,
                cell: ({ point }: { point: number }) => (
                  <WordButton
                    disabled={curve.length <= curvePoints.least}
                    onClick={() => tell({ type: 'removed', curve: name, point })}
                  >
                    remove<span className="sr-only"> point {point + 1}</span>
                  </WordButton>
                ),
              },
            ]
          : []),
      ]}
    />
  );
}
