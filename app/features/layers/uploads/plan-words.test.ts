import { describe, expect, it } from 'vitest';
import type { Upload } from '#contract/uploads.ts';
import { clearUploads, fileInWords, isReady, missingWords, planInWords } from './plan-words.ts';

const metric = {
  epsg: 32631,
  name: 'WGS 84 / UTM zone 31N',
  kind: 'projected',
  unit: 'metre',
  metresPerUnit: 1,
} as const;
const degrees = {
  epsg: 4326,
  name: 'WGS 84',
  kind: 'geographic',
  unit: 'degree',
  metresPerUnit: null,
} as const;
type Description = NonNullable<Upload['description']>;
type Plan = NonNullable<Upload['plan']>;
const file = {
  width: 640,
  height: 372,
  bands: [{}],
  crs: metric,
  cellWidth: 1,
  cellHeight: 1,
  cellMetres: { width: 1, height: 1 },
} as Description;
const plan = {
  sameCells: false,
  reprojection: null,
  cropped: { cells: 0, share: 0 },
  padded: { cells: 0, share: 0 },
  scaling: null,
  cautions: [],
} as unknown as Plan;

describe('a file in words', () => {
  it('has its CRS, cells and bands', () => {
    expect(fileInWords(file)).toBe('WGS 84 / UTM zone 31N (EPSG:32631); 640 × 372 cells of 1 m.');
    const wide = {
      ...file,
      cellHeight: 2,
      cellMetres: { width: 1, height: 2 },
      bands: [{}, {}],
    } as Description;
    expect(fileInWords(wide)).toMatch(/cells of 1 m by 2 m; 2 bands\.$/);
    const angular = { ...file, crs: degrees, cellWidth: 1e-5, cellHeight: 1e-5 };
    expect(fileInWords(angular)).toMatch(/^In degrees: WGS 84 \(EPSG:4326\).*0\.00001° \(about 1 m\)/);
  });
});

describe('a plan in words', () => {
  it('says that nothing is done to what lies on the site’s cells', () => {
    const same = { ...plan, sameCells: true };
    expect(planInWords(same)).toEqual([expect.stringMatching(/taken as it is, bit for bit/)]);
    expect(planInWords(same, 'metre')).toEqual(planInWords(same));
    expect(planInWords(same, 'us-foot')).toEqual([
      expect.stringMatching(/kept bit for bit, and its heights are read as US survey feet/),
    ]);
  });

  it('says what is done and what is lost', () => {
    const words = planInWords({
      ...plan,
      reprojection: { from: degrees, to: metric, datumShift: null },
      cropped: { cells: 1200, share: 0.1 },
      padded: { cells: 1, share: 0.001 },
      scaling: { scale: 0.01, offset: 5 },
      cautions: [{ code: 'method', text: 'Mind this.' }],
    });
    expect(words).toEqual([
      'It is brought from WGS 84 (EPSG:4326) to WGS 84 / UTM zone 31N (EPSG:32631).',
      '10 % of the file lies outside the site and is left out (1,200 cells).',
      'Under 1 % of the site is not reached and gets no data (1 cell).',
      'The file says value = stored number × 0.01 + 5, and is read so.',
      'Mind this.',
    ]);
    expect(planInWords(plan)).toEqual(['It covers the site exactly.']);
  });
});

describe('what is ready', () => {
  const upload = (part: string | null, more: Partial<Upload> = {}) =>
    ({
      state: 'choices',
      plan,
      problem: null,
      decisions: [],
      choices: { part },
      ...more,
    }) as unknown as Upload;

  it('has a part and a plan, and no problem', () => {
    expect(isReady(upload('cover'))).toBe(true);
    expect(isReady(upload('cover', { decisions: ['crop'] }))).toBe(true);
    for (const more of [
      { plan: null },
      { decisions: ['band'] },
      { decisions: ['heights'] },
      { decisions: ['values'] },
      { state: 'aligning' },
      { problem: { code: 'unusable-raster', detail: 'no' } },
    ] as Partial<Upload>[])
      expect(isReady(upload('cover', more))).toBe(false);
    expect(isReady(upload(null))).toBe(false);
  });

  it('names what is still missing, and nothing else', () => {
    expect(missingWords(upload(null, { decisions: ['band'] }))).toEqual([
      'which part it plays',
      'which band to read',
    ]);
    expect(missingWords(upload('elevation', { decisions: ['heights', 'pad'] }))).toEqual([
      'what its heights are in',
    ]);
    expect(missingWords(upload('cover'))).toEqual([]);
  });

  it('is placed together only where nothing is to be looked at and no two play one part', () => {
    const [habitat, first, second] = [upload('habitat'), upload('cover'), upload('cover')];
    expect(clearUploads([habitat, first])).toEqual([habitat, first]);
    expect(clearUploads([habitat, first, second])).toEqual([habitat]);
    expect(clearUploads([habitat, upload('cover', { decisions: ['pad'] })])).toEqual([habitat]);
  });
});
