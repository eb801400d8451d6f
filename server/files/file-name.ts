/**
 * A file name that reads well and is safe on any system: letters without accents, digits and hyphens, parts joined by
 * underscores. What other scripts hold falls away; a part of which nothing is left is dropped.
 */
export function safeFileName(parts: readonly (string | number)[], extension: string): string {
  const words = parts.map((part) =>
    String(part)
      .normalize('NFKD')
      .replace(/[\u0300-\u036f]/g, '')
      .replace(/[^A-Za-z0-9]+/g, '-')
      .slice(0, 60)
      .replace(/^-+|-+$/g, ''),
  );
  return `${words.filter(Boolean).join('_') || 'export'}.${extension}`;
}

/** The last part of a name that a client gave for a file, for show only: never used as a path. */
export function shownFileName(name: string): string {
  // eslint-disable-next-line no-control-regex -- control characters are what must go
  const last = (name.split(/[\\/]/).at(-1) ?? '').replace(/[\u0000-\u001f\u007f]/g, '').trim();
  return last.slice(-200) || 'unnamed';
}
