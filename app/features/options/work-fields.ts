import type { Work } from '#contract/works.ts';
import { parseNumber } from '#app/lib/parse-number.ts';
import { readYear, type Span } from './board/area-pen.ts';
import { readMoundField } from './mound-pen.ts';

/** What of one of the works can be typed. */
export type WorkField =
  'year' | 'until' | 'radius' | 'strength' | 'halo' | 'cover' | 'share' | 'each' | 'x' | 'y' | 'name';

const percent = (share: number) => String(Math.round(share * 10_000) / 100);

/** A field of one of the works as it would be typed, or undefined where there is no such field. */
export function fieldText(work: Work, field: WorkField): string | undefined {
  switch (field) {
    case 'name':
      return work.name ?? '';
    case 'until':
      return work.kind === 'fence' ? String(work.until ?? '') : undefined;
    case 'strength':
      return 'strength' in work ? percent(work.strength) : undefined;
    case 'cover':
      return work.kind === 'planting' ? percent(work.cover) : undefined;
    case 'share':
      return work.kind === 'loss' ? percent(work.share) : undefined;
    default: {
      const value = (work as Partial<Record<WorkField, number>>)[field];
      return value === undefined ? undefined : String(value);
    }
  }
}

/** One of the works with a field as it was typed, or what is wrong with that, in words. */
export function withField(work: Work, field: WorkField, text: string, span: Span): Work | string {
  const value = parseNumber(text);
  switch (field) {
    case 'name': {
      const name = text.trim();
      if (name.length > 100) return 'A name has at most 100 letters.';
      return { ...work, name: name === '' ? undefined : name };
    }
    case 'year': {
      const year = readYear(text, span);
      if (typeof year === 'string') return year;
      if (work.kind === 'fence' && work.until !== undefined && year > work.until)
        return `This fence ends in ${work.until}: it cannot start later.`;
      return { ...work, year };
    }
    case 'until': {
      if (work.kind !== 'fence') return work;
      if (text.trim() === '') return { ...work, until: undefined };
      const until = readYear(text, span);
      if (typeof until === 'string') return until;
      return until < work.year
        ? `This fence starts in ${work.year}: it cannot end sooner.`
        : { ...work, until };
    }
    case 'strength': {
      if (work.kind === 'mound')
        return ifRead(readMoundField(field, text), (read) => ({ ...work, strength: read }));
      if (work.kind !== 'fence') return work;
      return ifRead(readShare(value, 'A fence keeps out'), (read) => ({ ...work, strength: read }));
    }
    case 'radius':
    case 'halo':
      if (work.kind !== 'mound') return work;
      return ifRead(readMoundField(field, text), (read) => ({ ...work, [field]: read }));
    case 'cover':
      if (work.kind !== 'planting') return work;
      return ifRead(readShare(value, 'The cover must lie'), (read) => ({ ...work, cover: read }));
    case 'share':
      if (work.kind !== 'loss') return work;
      return ifRead(readShare(value, 'The share lost must lie'), (read) => ({ ...work, share: read }));
    case 'each':
      if (work.kind !== 'clumps') return work;
      return value !== undefined && Number.isInteger(value) && value >= 1 && value <= 100_000
        ? { ...work, each: value }
        : 'The clumps at a point must be a whole number from 1 to 100,000.';
    case 'x':
    case 'y':
      if (work.kind !== 'mound') return work;
      return value === undefined ? `“${text}” is no number.` : { ...work, [field]: value };
  }
}

const readShare = (value: number | undefined, what: string): number | string =>
  value !== undefined && value > 0 && value <= 100 ? value / 100 : `${what} above 0 and up to 100 %.`;

const ifRead = (read: number | string, put: (value: number) => Work): Work | string =>
  typeof read === 'string' ? read : put(read);
