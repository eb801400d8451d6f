import { useMemo, useState } from 'react';
import { newWorkId, type Work } from '#contract/works.ts';
import type { GainMap } from '#sim-core/plan/gain-map.ts';
import type { Suggestion } from '#sim-core/plan/suggest.ts';
import type { QuickLookStart } from '#app/workers/quick-look-desk.ts';
import { startGainMap, startSuggest } from '#app/workers/suggest-client.ts';
import { plantedMound } from '../board/planted-mounds.ts';
import type { PenMound } from '../mound-pen.ts';
import { readSuggest, startingSuggest, type SuggestPen } from './suggest-pen.ts';
import { usePlanJob, type PlanJob } from './use-plan-job.ts';

/** What a suggestion was asked for; the works of its places follow from it, whatever is typed meanwhile. */
interface Asked {
  readonly mound: PenMound;
  readonly year: number;
}

export interface Suggesting {
  readonly pen: SuggestPen;
  readonly setPen: (pen: SuggestPen) => void;
  /** what is wrong with what is typed, or with the mound that would be placed */
  readonly problem: string | undefined;
  readonly job: PlanJob<Suggestion>;
  readonly gain: PlanJob<GainMap>;
  readonly suggest: () => void;
  readonly askGain: () => void;
  /** how many of the suggested mounds are taken, the first so many */
  readonly taken: number;
  readonly take: (count: number) => void;
  /** works of those that are taken */
  readonly works: readonly Work[];
  readonly forget: () => void;
}

const noWorks: readonly Work[] = [];

/** Places for more mounds, suggested for a drawing as it is. */
export function useSuggest(input: {
  /** undefined while the ground is not complete */
  start: QuickLookStart | undefined;
  drawn: readonly Work[];
  mound: PenMound | undefined;
  year: number | undefined;
  /** cost of one mound with its clumps */
  each: number | undefined;
}): Suggesting {
  const { start, drawn, mound, year, each } = input;
  const [pen, setPen] = useState(startingSuggest);
  const [asked, setAsked] = useState<Asked>();
  const [wanted, take] = useState<number>();
  const job = usePlanJob<Suggestion>();
  const gain = usePlanJob<GainMap>();
  const amount = readSuggest(pen, each);
  const problem =
    start === undefined
      ? 'It needs the ground: habitat with its classes, and cover.'
      : mound === undefined || year === undefined
        ? 'What a mound is, is typed wrong: choose Mounds above the map and mend its sentence.'
        : typeof amount === 'string'
          ? amount
          : undefined;
  const request = start &&
    mound &&
    year !== undefined && { start, works: drawn, foothold: { ...mound, year } };
  const footholds = job.result?.footholds;
  const taken = Math.min(footholds?.length ?? 0, wanted ?? Infinity);
  const works = useMemo(
    () =>
      footholds && asked
        ? footholds
            .slice(0, taken)
            .flatMap(({ x, y }) => plantedMound(newWorkId, asked.mound, { x, y, year: asked.year }))
        : noWorks,
    [footholds, asked, taken],
  );
  return {
    ...{ pen, setPen, problem, job, gain, taken, take, works },
    suggest: () => {
      if (!request || !mound || year === undefined || typeof amount === 'string') return;
      setAsked({ mound, year });
      take(undefined);
      job.start((onProgress) => startSuggest({ ...request, amount }, onProgress));
    },
    askGain: () => {
      if (request) gain.start((onProgress) => startGainMap(request, onProgress));
    },
    forget: () => {
      job.forget();
      take(undefined);
    },
  };
}
