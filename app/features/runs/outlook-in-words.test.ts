import { expect, it } from 'vitest';
import { lossWords, trendWords } from './outlook-in-words.ts';

it('says a trend and losses in words', () => {
  expect(trendWords({ shiftPerDecade: -0.3, frequencyPerDecade: 1.2 })).toBe(
    '0.3 drier each decade, droughts 1.2 times as often after each decade',
  );
  expect(trendWords({ shiftPerDecade: 0.5 })).toBe('0.5 wetter each decade');
  expect(lossWords({ year: 2034, share: 0.3 })).toBe('30 % of the site in 2034');
  const area = { shape: 'disc', x: 0, y: 0, radius: 5 } as const;
  expect(lossWords({ chance: 0.05, share: 0.5, from: 2030, area })).toBe(
    '50 % of an area with a chance of 5 % a year from 2030',
  );
});
