import type { ReactNode } from 'react';
import type { Run } from '#contract/runs.ts';
import type { RunResult, SeriesRow } from '#sim-core/spec/run-result.ts';
import { RasterHashes } from '#app/components/raster-hashes.tsx';
import { formatArea, formatDateTime, formatNumber, formatShare } from '#app/lib/formats.ts';
import type { YearRecord } from '#app/yearline/year-records.ts';
import { lossWords, trendWords } from './outlook-in-words.ts';
import { outlookOfRun, plantOfRun } from './origins-in-words.ts';
import { lossesIn, type YearLosses } from './run-series.ts';
import { modeWords } from './run-words.ts';
import { surveyedInWords } from './surveyed-places.ts';

/** What the playhead's year holds, in figures and words. */
export function YearFacts(props: {
  year: number;
  record: YearRecord | undefined;
  compare: { label: string; record: YearRecord } | undefined;
  rows: readonly SeriesRow[];
  /** ΣC* × cell area, m², once it is known */
  referenceArea: number | undefined;
}) {
  const { year, record, compare } = props;
  if (!record) return null;
  const losses = lossesIn(props.rows, year);
  return (
    <section aria-label={`The year ${year}`} className="border-t border-rule py-2">
      <div className="flex items-baseline justify-between">
        <h2 className="text-body font-bold">{year}</h2>
        <span className="text-note text-ink-2">under the playhead</span>
      </div>
      <div className="grid grid-cols-2 gap-x-4">
        <Figure value={formatShare(record.coverShare)} words="of what the ground can carry is covered" />
        <Figure
          value={formatArea(record.closedArea)}
          words="ever closed: reached half of what the ground can carry at some time by then"
        />
      </div>
      <p className="mt-1 text-note text-ink-2">
        {formatArea(record.coveredArea)} covered
        {props.referenceArea !== undefined && `; the ground can carry ${formatArea(props.referenceArea)}`}.
        {compare && ` ${compare.label}: ${formatShare(compare.record.coverShare)}.`}
        {losses !== undefined && ` ${lossesInWords(year, losses)}`}
      </p>
    </section>
  );
}

/** `Lost in 2049: 5.2 ha, of it 5.1 ha to drought.`; a cause that took all or nothing is not given a figure. */
function lossesInWords(year: number, { drought, background, grazing, events }: YearLosses): string {
  const lost = drought + background + grazing + events;
  if (formatArea(lost) === formatArea(0)) return `Nothing was lost in ${year}.`;
  const causes = [
    ['drought', drought],
    ['background loss', background],
    ['grazing', grazing],
    ['one-off losses', events],
  ] as const;
  const parts = causes.filter(([, area]) => formatArea(area) !== formatArea(0));
  if (parts.length === 1) return `Lost in ${year}: ${formatArea(lost)}, all to ${parts[0][0]}.`;
  return `Lost in ${year}: ${formatArea(lost)}, of it ${parts.map(([cause, area]) => `${formatArea(area)} to ${cause}`).join(', ')}.`;
}

function Figure({ value, words }: { value: string; words: string }) {
  return (
    <div>
      <div className="text-figure font-light tracking-[-0.02em]">{value}</div>
      <div className="text-note leading-tight">{words}</div>
    </div>
  );
}

/** What decided the run, and what it amounts to: enough for somebody else to run it again. */
export function RunFacts({ run, result }: { run: Run; result: RunResult | undefined }) {
  const { spec } = run;
  const mode = modeWords[spec.mode];
  const surveyed = surveyedInWords(spec.layers);
  return (
    <section aria-label="What decided it" className="border-t border-rule py-2">
      <h2 className="mb-1 text-body font-bold">What decided it</h2>
      <dl className="grid grid-cols-[92px_minmax(0,1fr)] gap-x-3 gap-y-1 text-note">
        <Fact name="option">{run.optionName}</Fact>
        <Fact name="outlook">{outlookOfRun(run)}</Fact>
        {run.origins && <Fact name="plant">{plantOfRun(run.origins.plant)}</Fact>}
        <Fact name="seed">
          <span className="font-mono">{spec.seed}</span>
        </Fact>
        <Fact name="chance">
          {mode.name}
          {spec.mode === 'mean-field' && ', so the seed changes nothing'}
        </Fact>
        <Fact name="years">
          {spec.surveyYear} to {spec.surveyYear + spec.years}, {spec.stepsPerYear} step
          {spec.stepsPerYear === 1 ? '' : 's'} a year
        </Fact>
        {Object.keys(spec.processes).length > 0 && (
          <Fact name="processes">{Object.keys(spec.processes).join(' and ')}</Fact>
        )}
        {spec.trend && <Fact name="trend">{trendWords(spec.trend)}</Fact>}
        {spec.losses && spec.losses.length > 0 && (
          <Fact name="losses to come">{spec.losses.map(lossWords).join('; ')}</Fact>
        )}
        {result && (
          <Fact name="front">
            {formatNumber(result.kernel.frontSpeed)} m a year,{' '}
            {formatNumber(result.kernel.diagonalFrontSpeed)} m a year along the diagonal
          </Fact>
        )}
        {result && <Fact name="engine">{result.engineVersion}</Fact>}
        {run.digest !== null && (
          <Fact name="digest">
            <span className="font-mono break-all">{run.digest}</span>
          </Fact>
        )}
        {run.layers.map((layer) => (
          <Fact key={layer.hash} name={layer.part}>
            <span className="break-all">{layer.fileName}</span>
            {!layer.current && ', replaced on the site since'}
            <RasterHashes hash={layer.hash} sourceHash={layer.sourceHash} />
          </Fact>
        ))}
        {surveyed.length > 0 && <Fact name="points and areas">{surveyed.join(', ')}</Fact>}
        <Fact name="started">
          {formatDateTime(run.startedAt)}, {run.startedBy}
        </Fact>
      </dl>
    </section>
  );
}

function Fact({ name, children }: { name: string; children: ReactNode }) {
  return (
    <>
      <dt className="text-ink-2">{name}</dt>
      <dd className="min-w-0">{children}</dd>
    </>
  );
}
