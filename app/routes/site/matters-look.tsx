import { useQuery } from '@tanstack/react-query';
import { useMemo } from 'react';
import type { Comparison } from '#contract/comparisons.ts';
import { LoadingLines } from '#app/components/loading-lines.tsx';
import { ProblemNotice } from '#app/components/notice.tsx';
import { WordButton } from '#app/components/word-button.tsx';
import { replicatesQuery } from '#app/features/comparisons/get-comparison.ts';
import { LookChart } from '#app/features/matters/look-chart.tsx';
import { lookCsv } from '#app/features/matters/matters-files.ts';
import { measuredWords, type StudySettings } from '#app/features/matters/study-settings.ts';
import { formatNumber } from '#app/lib/formats.ts';
import { saveFile } from '#app/lib/save-file.ts';
import { firstLook } from '#sim-core/matters/first-look.ts';
import { mattersWords } from '#sim-core/matters/matters-words.ts';
import { leastPoints } from '#sim-core/matters/rank-influence.ts';
import { weightsOfLook } from '#sim-core/matters/weights.ts';
import type { Beliefs } from '#sim-core/spec/uncertain.ts';

/** What the futures that a comparison already has tell of the rates that they drew: no other run is made. */
export function MattersLook(props: {
  comparison: Comparison;
  settings: StudySettings;
  /** what the futures drew from; undefined where their rates were fixed */
  drawn: Beliefs | undefined;
}) {
  const { comparison, settings, drawn } = props;
  const { plan } = comparison;
  const { option, than, outlook, measure } = settings;
  const stored = useQuery({ ...replicatesQuery(comparison), enabled: drawn !== undefined });
  const look = useMemo(() => {
    if (!stored.data || !drawn) return undefined;
    const of = (place: number) =>
      new Map(stored.data[place][outlook].map((record) => [record.replicate, record]));
    return firstLook(of(option), than === undefined ? undefined : of(than), drawn, measure, plan.common);
  }, [stored.data, drawn, outlook, option, than, measure, plan]);
  return (
    <section aria-labelledby="matters-look" className="border-t border-ink pt-3 pb-6">
      <h2 id="matters-look" className="text-lead font-bold">
        From the futures at hand
      </h2>
      {drawn === undefined ? (
        <p className="max-w-[72ch] text-ink-2">
          Rates were fixed in this comparison, so its futures tell nothing of them. The study below takes what
          is believed of them now.
        </p>
      ) : measure.kind === 'closed' ? (
        <p className="max-w-[72ch] text-ink-2">
          Futures keep the covered area and the year of recovery, not the share closed. Ask the study below.
        </p>
      ) : stored.error ? (
        <ProblemNotice error={stored.error} title="The futures could not be fetched.">
          <WordButton lined onClick={() => void stored.refetch()}>
            Try again
          </WordButton>
        </ProblemNotice>
      ) : !stored.data ? (
        <LoadingLines label="Fetching the futures" lines={4} />
      ) : !look ? (
        <p className="max-w-[72ch] text-ink-2">
          The futures cannot tell: there are fewer than {leastPoints(Object.keys(drawn).length)}, or what is
          measured is the same in all of them.
        </p>
      ) : (
        <>
          <p className="max-w-[72ch] pt-1 text-[15px]">
            {mattersWords(weightsOfLook(look), measuredWords(settings, plan))}
          </p>
          <p className="max-w-[72ch] pt-1 text-note text-ink-2">
            {look.futures} futures, each with its own draw of every rate. Ranks of the rates explain{' '}
            {formatNumber(100 * look.explained, 0)} % of the ranks’ variance; the rest is weather, chance and
            what has no single direction.
            {look.cut > 0 &&
              measure.kind === 'recovery' &&
              ` In ${look.cut} of them recovery does not come by ${plan.common.surveyYear + plan.common.years}: they count as recovering then and share a rank.`}
          </p>
          <div className="pt-3">
            <LookChart look={look} />
            <WordButton
              lined
              className="mt-1"
              onClick={() =>
                saveFile(
                  'what-matters-futures.csv',
                  new Blob([lookCsv(look)], { type: 'text/csv;charset=utf-8' }),
                )
              }
            >
              Save as CSV
            </WordButton>
          </div>
        </>
      )}
    </section>
  );
}
