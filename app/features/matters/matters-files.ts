import { csv } from '#contract/csv.ts';
import type { FirstLook } from '#sim-core/matters/first-look.ts';
import { factorLabel } from '#sim-core/matters/matters-words.ts';
import { triedShares } from '#sim-core/matters/study-design.ts';
import type { StudyFigures } from '#sim-core/matters/study-figures.ts';

const round = (value: number): number | null =>
  Number.isFinite(value) ? Number(value.toPrecision(6)) : null;

/** Rank correlations of a comparison's own futures, as CSV of RFC 4180. */
export const lookCsv = ({ rates, futures }: FirstLook): string =>
  csv(
    ['rate', 'futures', 'partial_rank_correlation', 'low', 'high', 'rank_correlation'],
    rates.map(({ name, partial, correlation }) => [
      ...[name, futures, round(partial.estimate), round(partial.low), round(partial.high)],
      round(correlation),
    ]),
  );

/** What a study found, a row a factor; along the rates, a row a value. */
export function studyCsv(figures: StudyFigures, unit: string): string {
  switch (figures.method) {
    case 'one-at-a-time':
      return csv(
        ['rate', 'label', 'share_of_belief', 'value', `mean_${unit}`, 'futures'],
        figures.curves.flatMap(({ factor, values, outputs }) =>
          triedShares.map((share, i) => [
            ...[factor, factorLabel(factor), share],
            ...[round(values[i]), round(outputs[i]), figures.groups],
          ]),
        ),
      );
    case 'screening':
      return csv(
        ['factor', 'label', 'mean_size', 'mean_size_error', 'mean', 'deviation', 'unit', 'walks'],
        figures.effects.map(({ factor, meanSize, meanSizeError, mean, deviation }) => [
          ...[factor, factorLabel(factor), round(meanSize), round(meanSizeError), round(mean)],
          ...[round(deviation), unit, figures.groups],
        ]),
      );
    case 'indices':
      return csv(
        ['factor', 'label', 'first', 'first_low', 'first_high', 'total', 'total_low', 'total_high', 'rows'],
        figures.indices.map(({ factor, first, total }) => [
          ...[factor, factorLabel(factor), round(first.estimate), round(first.low), round(first.high)],
          ...[round(total.estimate), round(total.low), round(total.high), figures.groups],
        ]),
      );
  }
}
