const words = [
  ['ebb', 'flood', 'neap', 'slack', 'spring', 'storm', 'wind', 'salt', 'mud', 'reed', 'dune', 'moon'],
  ['heron', 'plover', 'knot', 'curlew', 'crab', 'mussel', 'oyster', 'cockle', 'snail', 'eel', 'tern', 'seal'],
] as const;

/** A seed that can be read out and typed again, such as `neap-curlew-4821`. */
export function randomSeed(random: (below: number) => number = below): string {
  const [first, second] = words.map((list) => list[random(list.length)]);
  return `${first}-${second}-${String(random(10_000)).padStart(4, '0')}`;
}

const below = (limit: number) => crypto.getRandomValues(new Uint32Array(1))[0] % limit;
