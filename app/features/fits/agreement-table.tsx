import { Table } from '#app/components/table.tsx';
import { formatArea, formatNumber, formatShare } from '#app/lib/formats.ts';
import type { CheckedMap, Spread } from './run-check.ts';

const spread = (of: Spread, format: (value: number) => string) =>
  of ? `${format(of[1])} (${format(of[0])} to ${format(of[2])})` : 'says nothing here';
const two = (value: number) => formatNumber(value, 2);
const metres = (value: number) => `${formatNumber(value, 1)} m`;

/** A fit map in numbers: areas, κ and its parts, disagreement of amount and place, edges. */
export function AgreementTable({ checked, cellArea }: { checked: CheckedMap; cellArea: number }) {
  const { agreement, change } = checked;
  const area = (cells: number) => formatArea(cells * cellArea);
  const rows: readonly (readonly [what: string, value: string, means: string])[] = [
    ['Hits', area(agreement.hits), 'standing in both'],
    ['Misses', area(agreement.misses), 'standing in the survey alone'],
    ['False alarms', area(agreement.falseAlarms), 'standing in the runs alone'],
    ['Bare in both', area(agreement.bareInBoth), ''],
    [
      'Figure of merit',
      change.figureOfMerit === undefined ? 'nothing changed' : two(change.figureOfMerit),
      'hits among all that changed since the start, in either',
    ],
    ['κ', spread(checked.kappa, two), 'agreement beyond chance: 1 is full, 0 is chance'],
    ['κ of place', spread(checked.kappaOfPlace, two), 'how well places fit, given the amounts'],
    ['κ of amount', spread(checked.kappaOfAmount, two), 'how well amounts fit; κ is the product of both'],
    ['Disagreement of amount', spread(checked.amountDisagreement, formatShare), 'of all cells compared'],
    ['Disagreement of place', spread(checked.placeDisagreement, formatShare), 'of all cells compared'],
    ['Hits among either', spread(checked.criticalSuccess, two), 'critical success index'],
    ['Edge off by', spread(checked.edge, metres), 'mean; above 0 where runs reach further than the survey'],
    ['Edge off by, either side', spread(checked.edgeSize, metres), 'mean size'],
  ];
  return (
    <Table
      caption={`How the runs and the resurvey of ${checked.year} fall together; of single runs the median, and nine tenths in brackets`}
      rows={rows}
      rowKey={([what]) => what}
      columns={[
        { key: 'what', head: 'measure', cell: ([what]) => what },
        { key: 'value', head: 'value', number: true, cell: ([, value]) => value },
        {
          key: 'means',
          head: 'means',
          wide: true,
          cell: ([, , means]) => <span className="text-ink-2">{means}</span>,
        },
      ]}
    />
  );
}
