import type { BriefSummary } from '#contract/briefs.ts';
import type { ComparisonSummary } from '#contract/comparisons.ts';
import type { RunSummary } from '#contract/runs.ts';
import type { Layer } from '#contract/layers.ts';
import type { Outlook } from '#contract/outlooks.ts';
import type { Site } from '#contract/sites.ts';
import { formatCounted, formatNumber } from '#app/lib/formats.ts';

export const stepKeys = ['ground', 'plant', 'outlook', 'options', 'runs', 'compare', 'brief'] as const;
export type StepKey = (typeof stepKeys)[number];

/** One step of the work on a site, as the tide staff shows it. */
export interface SiteStep {
  key: StepKey;
  label: string;
  to: string;
  state: string;
  /** 0..1, how much of it is done */
  share: number;
}

type StatedSite = Pick<
  Site,
  'id' | 'grid' | 'layers' | 'plant' | 'plantSet' | 'outlook' | 'outlookSet' | 'options' | 'runs'
>;

/**
 * The seven steps of a site with the true state of each in words. `runs`, `comparisons` and `briefs` are the newest
 * ones, where they are known.
 */
export function siteSteps(
  site: StatedSite,
  runs: readonly Pick<RunSummary, 'status'>[] = [],
  comparisons: readonly Pick<ComparisonSummary, 'status' | 'decision'>[] = [],
  briefs: readonly Pick<BriefSummary, 'sent'>[] = [],
): SiteStep[] {
  const states: Record<StepKey, [label: string, state: string, share: number]> = {
    ground: ['Ground', ...groundState(site)],
    plant: ['Plant', ...plantState(site)],
    outlook: ['Outlook', ...outlookState(site)],
    options: ['Options', ...optionsState(site.options)],
    runs: ['Runs', ...runsState(site.runs, runs)],
    compare: ['Compare', ...compareState(comparisons)],
    brief: ['Brief', ...briefState(briefs)],
  };
  return stepKeys.map((key) => {
    const [label, state, share] = states[key];
    return { key, label, state, share, to: `/sites/${site.id}/${key}` };
  });
}

type State = [state: string, share: number];

/** What a run still lacks of its ground: the parts without a layer, and the class table of habitat. */
export function missingGround(layers: readonly Layer[]): ('habitat' | 'classes' | 'cover')[] {
  const habitat = layers.find((layer) => layer.part === 'habitat');
  const missing: ('habitat' | 'classes' | 'cover')[] = [];
  if (!habitat) missing.push('habitat');
  else if (!habitat.classes) missing.push('classes');
  if (!layers.some((layer) => layer.part === 'cover')) missing.push('cover');
  return missing;
}

function groundState({ layers, grid }: StatedSite): State {
  const missing = missingGround(layers);
  const done = (3 - missing.length - (missing.includes('habitat') ? 1 : 0)) / 3;
  if (layers.length === 0) return ['no layers yet', 0];
  if (missing.includes('habitat')) return ['habitat is missing', done];
  if (missing.includes('cover')) return ['cover is missing', done];
  if (missing.includes('classes')) return ['habitat needs classes', done];
  return [`${formatCounted(layers.length, 'layer')} on a ${formatNumber(grid.cellSize)} m grid`, 1];
}

function plantState({ plantSet }: StatedSite): State {
  return plantSet ? ['set', 1] : ['not yet looked at', 0];
}

/** The years whose drought index lies below what open marsh bears. */
export function killingYears(
  { surveyYear, droughtIndex }: Pick<Outlook, 'surveyYear' | 'droughtIndex'>,
  tolerance: number,
): number[] {
  return droughtIndex.flatMap((index, i) => (index < tolerance ? [surveyYear + 1 + i] : []));
}

function outlookState({ outlook, outlookSet, plant }: StatedSite): State {
  const years = formatCounted(outlook.years, 'year');
  if (!outlookSet) return ['not yet looked at', 0];
  if (outlook.drawn) return [`${years}, weather drawn`, 1];
  const killing = killingYears(outlook, plant.rates.tolerance);
  if (killing.length === 0) return [`${years}, no drought`, 1];
  return [`${years}, ${killing.length === 1 ? `drought ${killing[0]}` : `${killing.length} of drought`}`, 1];
}

function optionsState(options: number): State {
  const drawn = Math.max(0, options - 1);
  return drawn === 0 ? ['Wait alone', 0] : [`${drawn} drawn beside Wait`, 1];
}

function runsState(count: number, known: readonly Pick<RunSummary, 'status'>[]): State {
  const total = Math.max(count, known.length);
  const running = known.filter((run) => run.status === 'running').length;
  const finished = known.some((run) => run.status === 'finished');
  if (total === 0) return ['none yet', 0];
  return [
    running > 0 ? `${formatCounted(total, 'run')}, ${running} running` : formatCounted(total, 'run'),
    finished ? 1 : 0.5,
  ];
}

function compareState(known: readonly Pick<ComparisonSummary, 'status' | 'decision'>[]): State {
  if (known.length === 0) return ['none yet', 0];
  const open = known.filter(({ decision }) => decision === null).length;
  if (open < known.length && open === 0) return [known.length === 1 ? 'decided' : 'all decided', 1];
  if (open === 1) return [known.length === 1 ? 'decision still open' : `1 of ${known.length} undecided`, 0.5];
  return [`${open} decisions open`, 0.5];
}

function briefState(known: readonly Pick<BriefSummary, 'sent'>[]): State {
  if (known.length === 0) return ['none yet', 0];
  const sent = known.filter((brief) => brief.sent > 0).length;
  if (sent === 0) return [known.length === 1 ? 'ready to send' : `${known.length}, none sent`, 0.5];
  return [known.length === 1 ? 'sent' : `${sent} of ${known.length} sent`, 1];
}
