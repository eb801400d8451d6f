/** Numbers as people read them: a thin space before units is left out on purpose, so that copied text stays plain. */
const locale = 'en-GB';
const whole = new Intl.NumberFormat(locale, { maximumFractionDigits: 0 });
/** Made once each: making one takes as long as hundreds of numbers written with it. */
const formats = new Map<number, Intl.NumberFormat>();
function formatOf(decimals: number): Intl.NumberFormat {
  const made = formats.get(decimals) ?? new Intl.NumberFormat(locale, { maximumFractionDigits: decimals });
  formats.set(decimals, made);
  return made;
}
const oneDecimal = new Intl.NumberFormat(locale, { maximumFractionDigits: 1 });
const date = new Intl.DateTimeFormat(locale, { day: 'numeric', month: 'short', year: 'numeric' });
const dateTime = new Intl.DateTimeFormat(locale, {
  day: 'numeric',
  month: 'short',
  year: 'numeric',
  hour: '2-digit',
  minute: '2-digit',
});
const plural = new Intl.PluralRules(locale);

/** `1,234` */
export const formatCount = (n: number): string => whole.format(n);

/** `1 run`, `12 runs`; give the plural where it is not made with an s. */
export function formatCounted(n: number, one: string, many = `${one}s`): string {
  return `${formatCount(n)} ${plural.select(n) === 'one' ? one : many}`;
}

/** Number with as many decimals as three significant digits need, at most `decimals`. */
export function formatNumber(value: number, decimals = 2): string {
  const size = Math.abs(value);
  const wanted = size >= 100 ? 0 : size >= 10 ? 1 : decimals;
  return formatOf(Math.min(wanted, decimals)).format(value).replace('-', '−');
}

/** Area from m²: below one hectare in m², else in ha. */
export function formatArea(squareMetres: number): string {
  return Math.abs(squareMetres) < 10_000
    ? `${whole.format(squareMetres)} m²`
    : `${formatNumber(squareMetres / 10_000, 1)} ha`;
}

/** Length from m: from 10 km on in km. */
export function formatLength(metres: number): string {
  return Math.abs(metres) < 10_000 ? `${formatNumber(metres)} m` : `${formatNumber(metres / 1000, 1)} km`;
}

/** Share 0..1 as whole per cent; what is neither none nor all is never written as 0 or 100. */
export function formatShare(share: number): string {
  const percent = share * 100;
  if (percent > 0 && percent < 0.5) return 'under 1 %';
  if (percent < 100 && percent >= 99.5) return 'over 99 %';
  return `${Math.round(percent)} %`;
}

/** `1 Dec 2026` */
export const formatDate = (instant: string | Date): string => date.format(new Date(instant));

/** `1 Dec 2026, 14:05` */
export const formatDateTime = (instant: string | Date): string => dateTime.format(new Date(instant));

/** Size of a file from bytes: `1.4 MB` */
export function formatBytes(bytes: number): string {
  const units = ['bytes', 'kB', 'MB', 'GB'];
  let value = bytes;
  let unit = 0;
  while (value >= 1000 && unit < units.length - 1) {
    value /= 1000;
    unit += 1;
  }
  return unit === 0 ? formatCounted(bytes, 'byte') : `${oneDecimal.format(value)} ${units[unit]}`;
}

/** Time left, from seconds, in words that do not pretend to be exact: `under 5 s`, `40 s`, `1 min 40 s`, `2 h 5 min`. */
export function formatDuration(seconds: number): string {
  if (seconds < 5) return 'under 5 s';
  const rounded = seconds < 60 ? Math.ceil(seconds / 5) * 5 : Math.ceil(seconds / 10) * 10;
  const hours = Math.floor(rounded / 3600);
  const minutes = Math.floor((rounded % 3600) / 60);
  const rest = rounded % 60;
  if (hours > 0) return `${hours} h ${minutes} min`;
  if (minutes > 0) return rest > 0 && minutes < 10 ? `${minutes} min ${rest} s` : `${minutes} min`;
  return `${rest} s`;
}
