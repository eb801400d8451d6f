import type { KnownOrigin } from '#contract/plants.ts';

/** Where the plant of a site comes from, in a sentence. */
export function originWords(known: KnownOrigin | null): string {
  if (!known) return 'Typed in on this site; taken from no profile.';
  const { origin, name, latest, changed } = known;
  if (name === null) return 'Taken from a profile that is no longer there.';
  const version =
    origin.kind === 'library' ? `, version ${origin.version}` : ', starting values from the literature';
  const newer =
    origin.kind === 'library' && latest !== null && latest > origin.version
      ? ` The library has version ${latest}.`
      : '';
  return `Taken from “${name}”${version}${changed ? '; changed since' : ''}.${newer}`;
}
