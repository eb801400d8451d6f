import { spawnSync } from 'node:child_process';

/** The text of a PDF, page by page, line breaks as blanks; undefined where poppler-utils is not installed. */
export function pdfText(pdf: Buffer): string[] | undefined {
  const { error, stdout } = spawnSync('pdftotext', ['-', '-'], { input: pdf });
  if (error) return undefined;
  return stdout
    .toString()
    .split('\f')
    .slice(0, -1)
    .map((text) => text.replace(/\s+/g, ' ').trim());
}
