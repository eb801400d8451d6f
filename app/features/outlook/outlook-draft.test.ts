import { describe, expect, it } from 'vitest';
import { unchangedOutlook, type Outlook } from '#contract/outlooks.ts';
import { draftErrors, draftOutlook, layOver, outlookDraft, startDraft } from './outlook-draft.ts';

const outlook: Outlook = {
  ...unchangedOutlook,
  surveyYear: 2026,
  years: 3,
  stepsPerYear: 1,
  boundary: 'mirror',
  droughtIndex: [-1, -2, -3],
  drawn: null,
};
const start = startDraft(outlook);

describe('outlookDraft', () => {
  it('gives back what it was started with', () => {
    expect(draftOutlook(start)).toEqual(outlook);
  });

  it('keeps values at their calendar years when the survey year moves', () => {
    const moved = outlookDraft(start, { type: 'surveyYear', text: '2027' });
    expect(draftOutlook(moved)).toMatchObject({ surveyYear: 2027, droughtIndex: [-2, -3, 0] });
  });

  it('loses nothing to a shorter horizon, nor to a half-typed number', () => {
    const short = outlookDraft(start, { type: 'years', text: '1' });
    expect(draftOutlook(short)!.droughtIndex).toEqual([-1]);
    const emptied = outlookDraft(short, { type: 'years', text: '' });
    expect(draftOutlook(emptied)).toBeUndefined();
    expect(draftErrors(emptied).years).toContain('1 to 500');
    expect(emptied.span.years).toBe(1);
    expect(draftOutlook(outlookDraft(emptied, { type: 'years', text: '3' }))).toEqual(outlook);
  });

  it('refuses what is no year', () => {
    for (const text of ['999', '2026.5', 'soon'])
      expect(draftErrors(outlookDraft(start, { type: 'surveyYear', text })).surveyYear).toContain(
        '1000 to 9000',
      );
  });

  it('keeps single values on the scale and to a hundredth', () => {
    const set = (value: number) =>
      draftOutlook(outlookDraft(start, { type: 'value', year: 2028, value }))!.droughtIndex[1];
    expect(set(-99)).toBe(-15);
    expect(set(0.12345)).toBe(0.12);
    expect(Object.is(set(-0.001), 0)).toBe(true);
  });

  it('sets every year to one value', () => {
    expect(draftOutlook(outlookDraft(start, { type: 'constant', value: -0.5 }))!.droughtIndex).toEqual([
      -0.5, -0.5, -0.5,
    ]);
  });
});

describe('layOver', () => {
  const entries = [
    { year: 2028, value: 1 },
    { year: 2029, value: 2 },
    { year: 2040, value: 3 },
  ];

  it('goes by the years that are named', () => {
    const laid = layOver(start, entries, 'by-year');
    expect(laid).toMatchObject({ set: 2, kept: 1, unused: 1 });
    const draft = outlookDraft(start, { type: 'laid', values: laid.values });
    expect(draftOutlook(draft)!.droughtIndex).toEqual([-1, 1, 2]);
  });

  it('or value by value from the first simulated year', () => {
    const laid = layOver(start, entries, 'in-order');
    expect(laid).toMatchObject({ set: 3, kept: 0, unused: 0 });
    expect(draftOutlook(outlookDraft(start, { type: 'laid', values: laid.values }))!.droughtIndex).toEqual([
      1, 2, 3,
    ]);
  });

  it('takes nothing from a series of other years', () => {
    expect(layOver(start, [{ year: 1990, value: 1 }], 'by-year')).toMatchObject({
      set: 0,
      kept: 3,
      unused: 1,
    });
  });
});
