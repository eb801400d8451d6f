import { expect, test } from 'vitest';
import { placesOffTrack, standingAmong } from './on-track.ts';

const futures = Array.from({ length: 101 }, (_, i) => 1000 + i);

test.each([
  [1004, 'behind', 4.5 / 101],
  [1005, 'on track', 5.5 / 101],
  [1050, 'on track', 50.5 / 101],
  [1095, 'on track', 95.5 / 101],
  [1096, 'ahead', 96.5 / 101],
] as const)('%i m² among 1,000 to 1,100 is %s', (surveyed, track, shareBelow) => {
  const found = standingAmong(surveyed, futures);
  expect(found).toMatchObject({ track, low: 1005, middle: 1050, high: 1095 });
  expect(found.shareBelow).toBeCloseTo(shareBelow, 12);
});

test('cells are off track where nineteen futures of twenty say otherwise', () => {
  const survey = Uint8Array.from([1, 1, 0, 0, 255]);
  const chance = Uint8Array.from([12, 13, 243, 242, 0]);
  const found = placesOffTrack(survey, chance);
  expect([...found.cells]).toEqual([1, 0, 2, 0, 255]);
  expect(found).toMatchObject({ ahead: 1, behind: 1, expected: 2 });
});
