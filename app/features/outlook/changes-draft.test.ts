import { describe, expect, it } from 'vitest';
import { outlookSchema } from '#contract/outlooks.ts';
import { changesErrors, newLoss, outlookChanges, startChanges } from './changes-draft.ts';

const outlook = outlookSchema.parse({
  surveyYear: 2026,
  years: 2,
  stepsPerYear: 1,
  boundary: 'mirror',
  droughtIndex: [0, 0],
  trend: { shiftPerDecade: -0.3, frequencyPerDecade: 1.2 },
  losses: [
    { year: 2027, share: 0.29 },
    { chance: 0.07, from: 2027, until: 2028, share: 0.5, area: { shape: 'disc', x: 1, y: 2, radius: 3 } },
    {
      chance: 0.05,
      share: 1,
      area: {
        shape: 'polygon',
        ring: [
          [0, 0],
          [1, 0],
          [1, 1],
        ],
      },
    },
  ],
  grazing: false,
});

describe('what an outlook changes, as typed', () => {
  it('gives back what it was started with', () => {
    const { trend, losses, grazing } = outlook;
    expect(outlookChanges(startChanges(outlook))).toEqual({ trend, losses, grazing });
    expect(outlookChanges(startChanges({ ...outlook, trend: null, losses: [] }))).toMatchObject({
      trend: null,
      losses: [],
    });
  });
  it('says what is wrong, and stands for nothing meanwhile', () => {
    const draft = startChanges(outlook);
    const wrong = {
      ...draft,
      shiftPerDecade: 'drier',
      losses: [
        { ...newLoss([], 2027), share: '120' },
        { ...newLoss([], 2027), from: '27.5' },
      ],
    };
    expect(changesErrors(wrong)).toEqual([
      'Found “drier” as the shift a decade; a number from -5 to 5 is expected',
      'Found “120” as the share of loss 1; a number from 0 to 100 is expected',
      'Found “27.5” as the year of loss 2; a year from 1000 to 9999 is expected',
    ]);
    expect(outlookChanges(wrong)).toBeUndefined();
  });
});
