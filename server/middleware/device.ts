const browsers: readonly [pattern: RegExp, name: string][] = [
  [/Firefox\//, 'Firefox'],
  [/Edg(A|iOS)?\//, 'Edge'],
  [/OPR\//, 'Opera'],
  [/(Chrome|CriOS)\//, 'Chrome'],
  [/Safari\//, 'Safari'],
];
const systems: readonly [pattern: RegExp, name: string][] = [
  [/iPhone|iPad/, 'iOS'],
  [/Android/, 'Android'],
  [/Windows/, 'Windows'],
  [/Mac OS X|Macintosh/, 'macOS'],
  [/CrOS/, 'ChromeOS'],
  [/Linux/, 'Linux'],
];

const first = (names: readonly [RegExp, string][], text: string) =>
  names.find(([pattern]) => pattern.test(text))?.[1];

/** Browser and system in a few words, as its owner would name them; for the list of sessions, never for a decision. */
export function describeDevice(userAgent: string | undefined): string {
  const browser = first(browsers, userAgent ?? '');
  const system = first(systems, userAgent ?? '');
  if (browser && system) return `${browser} on ${system}`;
  return browser ?? (system ? `A program on ${system}` : 'A program');
}
