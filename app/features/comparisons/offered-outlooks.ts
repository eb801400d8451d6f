import type { ComparedOutlook } from '#contract/comparisons.ts';
import { outlookWeather } from '#contract/outlooks.ts';
import type { Site } from '#contract/sites.ts';
import { shiftedWeather } from './compose-plan.ts';

export const mainOutlookKey = 'main';
const variants = [
  { key: 'drier', name: 'Drier', by: -0.5, label: 'a drier one (index 0.5 lower)' },
  { key: 'wetter', name: 'Wetter', by: 0.5, label: 'a wetter one (index 0.5 higher)' },
] as const;

/** An outlook that a comparison may run under. */
export interface OfferedOutlook {
  readonly key: string;
  readonly label: string;
  readonly outlook: ComparedOutlook;
}

/** What a site offers: its main outlook, its further ones, and the main one made drier and wetter throughout. */
export function offeredOutlooks({
  outlook,
  otherOutlooks,
}: Pick<Site, 'outlook' | 'otherOutlooks'>): OfferedOutlook[] {
  const kept = [{ ...outlook, id: mainOutlookKey }, ...otherOutlooks].map((each) => ({
    key: each.id,
    label: `${each.name}${each.drawn ? ', drawn anew in each future' : ', the same in every future'}`,
    outlook: { name: each.name, ...outlookWeather(each, 'ensemble') },
  }));
  const names = kept.map((each) => each.outlook.name);
  const [{ outlook: main }] = kept;
  return [
    ...kept,
    ...variants.map(({ key, name, by, label }) => ({
      key,
      label,
      outlook: {
        ...main,
        name: names.includes(name) ? `${name} by 0.5` : name,
        droughtIndex: shiftedWeather(main.droughtIndex, by),
      },
    })),
  ];
}
