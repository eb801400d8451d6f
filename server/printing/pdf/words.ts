import type { Setting, Sheet } from './sheet.ts';

/** Paragraphs and list items of a text in which a line that begins with a hyphen is an item. */
export function linesOf(words: string): { item: boolean; text: string }[] {
  return words
    .split(/\n+/)
    .map((line) => line.trim())
    .filter(Boolean)
    .map((line) => {
      const item = /^[-–•]\s+/.exec(line);
      return { item: item !== null, text: item ? line.slice(item[0].length) : line };
    });
}

/** Sets paragraphs and lists one below the other; returns where they end. */
export function writeWords(sheet: Sheet, words: string, x: number, y: number, setting: Setting): number {
  let at = y;
  const gap = setting.size * 0.35;
  for (const { item, text } of linesOf(words)) {
    if (item) at = writeItem(sheet, text, x, at, setting);
    else
      sheet.tag('P', () => {
        at = sheet.write(text, x, at, setting);
      });
    at += gap;
  }
  return at;
}

export function writeItem(sheet: Sheet, text: string, x: number, y: number, setting: Setting): number {
  const indent = setting.size * 0.95;
  let end = y;
  sheet.group('L', () =>
    sheet.group('LI', () => {
      sheet.tag('Lbl', () => {
        sheet.write('–', x, y, { ...setting, width: indent });
      });
      sheet.tag('LBody', () => {
        end = sheet.write(text, x + indent, y, { ...setting, width: setting.width - indent });
      });
    }),
  );
  return end;
}
