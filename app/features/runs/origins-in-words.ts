import type { Run, RunOrigins } from '#contract/runs.ts';

/** `Dry decades, future 3 of its drawn weather`; `The outlook, its listed years` */
export function outlookOfRun({ origins, spec }: Pick<Run, 'origins' | 'spec'>): string {
  const { droughtIndex } = spec;
  const drawn = typeof droughtIndex === 'object' && 'kind' in droughtIndex;
  const weather = drawn ? `future ${spec.replicate + 1} of its drawn weather` : 'its listed years';
  const outlook = origins?.outlook;
  if (outlook) return `${outlook.name}, ${weather}`;
  const known = drawn ? `drawn weather, future ${spec.replicate + 1}` : 'listed years';
  return origins ? `${known}; as none of the site’s outlooks had it` : known;
}

/** `Cordgrass, from “Cordgrass of the bay”, version 2; changed since` */
export function plantOfRun({ name, profile, asSet }: RunOrigins['plant']): string {
  const parts = [
    name,
    ...(profile
      ? [
          `from “${profile.name}”${profile.version === null ? ', a starting profile' : `, version ${profile.version}`}`,
        ]
      : ['typed in on the site']),
  ];
  const notes = [
    ...(profile?.changed ? ['changed since'] : []),
    ...(asSet ? [] : ['with rates of this run’s own']),
  ];
  return [parts.join(', '), ...notes].join('; ');
}
