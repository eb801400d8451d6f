/**
 * A number as people type it: spaces around it, a decimal comma and the minus sign of typography are understood.
 * Thousands separators are not, since `1,500` would be a guess.
 *
 * @returns undefined where the text is no number
 */
export function parseNumber(text: string): number | undefined {
  const plain = text.trim().replace('−', '-').replace(',', '.');
  return /^[+-]?(\d+\.?\d*|\.\d+)(e[+-]?\d+)?$/i.test(plain) ? Number(plain) : undefined;
}
