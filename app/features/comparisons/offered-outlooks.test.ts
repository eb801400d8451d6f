import { expect, it } from 'vitest';
import { outlookSchema } from '#contract/outlooks.ts';
import { offeredOutlooks } from './offered-outlooks.ts';

const outlook = outlookSchema.parse({
  ...{ surveyYear: 2026, years: 2, stepsPerYear: 1, boundary: 'mirror', droughtIndex: [0, -1] },
  trend: { shiftPerDecade: -0.3 },
});
const drier = { ...outlook, id: 'a', name: 'Drier', losses: [{ year: 2027, share: 0.3 }], grazing: false };

it('offers the main outlook, the further ones and two that are shifted, each with what it changes', () => {
  const offered = offeredOutlooks({ outlook, otherOutlooks: [drier] });
  expect(offered.map(({ key, outlook: { name } }) => [key, name])).toEqual([
    ['main', 'The outlook'],
    ['a', 'Drier'],
    ['drier', 'Drier by 0.5'],
    ['wetter', 'Wetter'],
  ]);
  expect(offered[1].outlook).toEqual({
    name: 'Drier',
    droughtIndex: [0, -1],
    trend: { shiftPerDecade: -0.3 },
    losses: [{ year: 2027, share: 0.3 }],
    grazing: false,
  });
  expect(offered[2].outlook).toMatchObject({ droughtIndex: [-0.5, -1.5], trend: { shiftPerDecade: -0.3 } });
});
