import { spawnSync } from 'node:child_process';

const found = spawnSync('pdftotext', ['-v']).error === undefined;

/** Why PDFs cannot be looked at here; undefined where they can. */
export const noPdfTools = found
  ? undefined
  : 'poppler-utils is not installed (as root: apt-get install poppler-utils)';

const run = (command: string, args: string[], input: Buffer): string => {
  const { status, stdout, stderr } = spawnSync(command, args, { input, maxBuffer: 64 * 1024 * 1024 });
  if (status !== 0) throw new Error(`${command}: ${stderr.toString()}`);
  return stdout.toString();
};

/** The text of a PDF, page by page, in its reading order, with line breaks as blanks. */
export const pdfText = (pdf: Buffer): string[] =>
  run('pdftotext', ['-', '-'], pdf)
    .split('\f')
    .slice(0, -1)
    .map((text) => text.replace(/\s+/g, ' ').trim());
/** What `pdfinfo` says, with its structure where that is asked for. */
export const pdfFacts = (pdf: Buffer, ...options: string[]): string => run('pdfinfo', [...options, '-'], pdf);
/** What `pdffonts` says of each font. */
export const pdfFonts = (pdf: Buffer): string[] => run('pdffonts', ['-'], pdf).trim().split('\n').slice(2);
/** A page as raw grey pixels (PGM, its head included). */
export const pdfPixels = (pdf: Buffer, page: number): Buffer => {
  const { status, stdout, stderr } = spawnSync(
    'pdftoppm',
    ['-f', String(page), '-l', String(page), '-r', '50', '-gray', '-'],
    { input: pdf, maxBuffer: 64 * 1024 * 1024 },
  );
  if (status !== 0) throw new Error(stderr.toString());
  return stdout;
};
