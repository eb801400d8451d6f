import type { Outlook } from '#contract/outlooks.ts';
import { parseNumber } from '#app/lib/parse-number.ts';
import type { Area } from '#sim-core/spec/run-spec.ts';
import type { ExpectedLoss } from '#sim-core/spec/outlook-changes.ts';

/** A loss to come, as typed. */
export interface LossDraft {
  readonly key: number;
  readonly comes: 'in a year' | 'by chance';
  /** the year, or the first in which it may come */
  readonly from: string;
  /** last year in which it may come; empty: to the horizon */
  readonly until: string;
  /** per cent a year */
  readonly chance: string;
  /** per cent of the cover */
  readonly share: string;
  readonly where: 'the whole site' | 'a disc' | 'an outline';
  /** of a disc, in the site's CRS and metres */
  readonly x: string;
  readonly y: string;
  readonly radius: string;
  /** an outline that was not drawn here is kept as it is */
  readonly outline: Area | undefined;
}

/** What an outlook changes besides its weather, as typed. */
export interface ChangesDraft {
  readonly shiftPerDecade: string;
  readonly frequencyPerDecade: string;
  readonly losses: readonly LossDraft[];
  readonly grazing: boolean;
}

const figure = (x: number) => String(Math.round(x * 1e6) / 1e6);

/** A loss to begin with. @param year in which it comes */
export const newLoss = (losses: readonly LossDraft[], year: number): LossDraft => ({
  key: Math.max(0, ...losses.map(({ key }) => key)) + 1,
  comes: 'in a year',
  from: String(year),
  until: '',
  chance: '5',
  share: '30',
  where: 'the whole site',
  ...{ x: '', y: '', radius: '50', outline: undefined },
});

export function startChanges({ trend, losses, grazing }: Outlook): ChangesDraft {
  return {
    shiftPerDecade: figure(trend?.shiftPerDecade ?? 0),
    frequencyPerDecade: figure(trend?.frequencyPerDecade ?? 1),
    losses: losses.map((loss, i) => {
      const { area } = loss;
      const disc = area?.shape === 'disc' ? area : undefined;
      return {
        ...newLoss([], 0),
        key: i + 1,
        comes: 'year' in loss ? 'in a year' : 'by chance',
        from: 'year' in loss ? String(loss.year) : loss.from === undefined ? '' : String(loss.from),
        until: 'year' in loss || loss.until === undefined ? '' : String(loss.until),
        chance: 'year' in loss ? '5' : figure(loss.chance * 100),
        share: figure(loss.share * 100),
        where: area === undefined ? 'the whole site' : disc ? 'a disc' : 'an outline',
        ...(disc && { x: figure(disc.x), y: figure(disc.y), radius: figure(disc.radius) }),
        outline: disc ? undefined : area,
      };
    }),
    grazing,
  };
}

/** What is wrong, each as a sentence; empty when nothing is. */
export function changesErrors(draft: ChangesDraft): string[] {
  const errors: string[] = [];
  const number = (text: string, what: string, least: number, most: number, whole = false) => {
    const value = parseNumber(text);
    if (value === undefined || value < least || value > most || (whole && !Number.isInteger(value)))
      errors.push(
        `Found “${text.trim()}” as ${what}; a ${whole ? 'year' : 'number'} from ${least} to ${most} is expected`,
      );
  };
  number(draft.shiftPerDecade, 'the shift a decade', -5, 5);
  number(draft.frequencyPerDecade, 'how many times as often', 0.2, 5);
  draft.losses.forEach((loss, i) => {
    const of = `of loss ${i + 1}`;
    if (loss.comes === 'in a year' || loss.from.trim() !== '')
      number(loss.from, `the year ${of}`, 1000, 9999, true);
    if (loss.comes === 'by chance') {
      if (loss.until.trim() !== '') number(loss.until, `the last year ${of}`, 1000, 9999, true);
      number(loss.chance, `the chance ${of}`, 0.01, 100);
    }
    number(loss.share, `the share ${of}`, 0, 100);
    if (loss.where === 'a disc') {
      number(loss.x, `the easting ${of}`, -1e8, 1e8);
      number(loss.y, `the northing ${of}`, -1e8, 1e8);
      number(loss.radius, `the radius ${of}`, 0.01, 1e6);
    }
  });
  return errors;
}

/** What the draft stands for; undefined while something is wrong. */
export function outlookChanges(
  draft: ChangesDraft,
): Pick<Outlook, 'trend' | 'losses' | 'grazing'> | undefined {
  if (changesErrors(draft).length > 0) return undefined;
  const shiftPerDecade = parseNumber(draft.shiftPerDecade)!;
  const frequencyPerDecade = parseNumber(draft.frequencyPerDecade)!;
  const trend = {
    ...(shiftPerDecade !== 0 && { shiftPerDecade }),
    ...(frequencyPerDecade !== 1 && { frequencyPerDecade }),
  };
  return {
    trend: Object.keys(trend).length > 0 ? trend : null,
    losses: draft.losses.map(lossOf),
    grazing: draft.grazing,
  };
}

function lossOf(loss: LossDraft): ExpectedLoss {
  const share = round(parseNumber(loss.share)! / 100);
  const area: Area | undefined =
    loss.where === 'a disc'
      ? { shape: 'disc', x: parseNumber(loss.x)!, y: parseNumber(loss.y)!, radius: parseNumber(loss.radius)! }
      : loss.where === 'an outline'
        ? loss.outline
        : undefined;
  const rest = { share, ...(area && { area }) };
  if (loss.comes === 'in a year') return { year: Number(parseNumber(loss.from)), ...rest };
  const [from, until] = [parseNumber(loss.from), parseNumber(loss.until)];
  return {
    chance: round(parseNumber(loss.chance)! / 100),
    ...(from !== undefined && { from }),
    ...(until !== undefined && { until }),
    ...rest,
  };
}

/** Per cent and back must come to the same number. */
const round = (x: number) => Number(x.toPrecision(12));
