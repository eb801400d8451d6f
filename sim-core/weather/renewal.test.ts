import { expect, test } from 'vitest';
import { stream } from '#sim-core/random/streams.ts';
import type { DroughtRenewal } from '#sim-core/spec/weather-source.ts';
import { drawRenewal } from './renewal.ts';

const uniformOf = (seed: string, replicate = 0) => stream(seed, `weather/${replicate}`);
const fixed = (years: number) => ({ law: 'fixed', years }) as const;
const exponential = (mean: number) => ({ law: 'exponential', mean }) as const;

test('fixed intervals, drawn by hand', () => {
  const renewal: DroughtRenewal = {
    returnInterval: fixed(5),
    sinceLatest: 1,
    depth: -4,
    length: fixed(2),
    between: 0.5,
  };
  const draw = (given: Partial<DroughtRenewal>, stepsPerYear = 1) =>
    [...drawRenewal({ ...renewal, ...given }, 12, stepsPerYear, uniformOf('a'))]
      .map((x) => (x === -4 ? 'd' : x === 0.5 ? '.' : '?'))
      .join('');
  // The latest drought began a year before the survey and has a year to go.
  expect(draw({})).toBe('d...dd...dd.');
  expect(draw({ sinceLatest: 0 })).toBe('dd...dd...dd');
  expect(draw({ sinceLatest: 3 })).toBe('..dd...dd...');
  expect(draw({ sinceLatest: 30 })).toBe('dd...dd...dd');
  expect(draw({}, 4)).toBe('dddd........');
  // 2.6 years from 0.5 on last over the middles 0.5 (at its very beginning) to 2.5
  expect(draw({ sinceLatest: 4.5, length: fixed(2.6) })).toBe('ddd..ddd..dd');
  // A drought as long as the interval never ends.
  expect(draw({ length: fixed(9) })).toBe('dddddddddddd');
});

test('becomes the two-state chain: dry a fifth of the time, for 2.5 years, every 12.5, correlation 0.5', () => {
  // Wilks, Statistical Methods in the Atmospheric Sciences: P(wet→dry) = 0.1 and P(dry→wet) = 0.4 are the yearly
  // samples of a chain in continuous time with rates 0.2 ln 2 and 0.8 ln 2, which this renewal is.
  const renewal: DroughtRenewal = {
    returnInterval: exponential(1 / (0.2 * Math.LN2)),
    sinceLatest: 0,
    depth: -3,
    length: exponential(1 / (0.8 * Math.LN2)),
  };
  const steps = 200_000;
  const dry = [...drawRenewal(renewal, steps, 1, uniformOf('chain'))].map((x) => (x === -3 ? 1 : 0));
  const share = dry.reduce<number>((a, b) => a + b, 0) / steps;
  let onsets = 0;
  let both = 0;
  for (let i = 1; i < steps; i++) {
    if (dry[i] && !dry[i - 1]) onsets++;
    if (dry[i] && dry[i - 1]) both++;
  }
  // Four standard errors: of the share √(0.16 · 3 / steps), of the counts as binomial.
  expect(Math.abs(share - 0.2)).toBeLessThan(4 * Math.sqrt((0.16 * 3) / steps));
  expect(steps / onsets / 12.5).toBeCloseTo(1, 1.4);
  expect(Math.abs(onsets / (steps * (1 - share)) - 0.1)).toBeLessThan(4 * Math.sqrt(0.09 / (0.8 * steps)));
  expect(Math.abs((share * steps) / onsets - 2.5)).toBeLessThan(0.07);
  expect(Math.abs((both / steps - share * share) / (share * (1 - share)) - 0.5)).toBeLessThan(0.012);
});

test('the first drought comes within n years with the chance of its law', () => {
  const within = (given: Partial<DroughtRenewal>, years: number) => {
    let hits = 0;
    for (let replicate = 0; replicate < 4000; replicate++) {
      const renewal: DroughtRenewal = {
        returnInterval: exponential(10),
        sinceLatest: 7,
        depth: -4,
        length: fixed(1),
        ...given,
      };
      // A drought of one year from time t on takes the step whose middle lies in it, and until the middle of the survey
      // year none began: exactly `years` years in which one may.
      if (drawRenewal(renewal, years, 1, uniformOf('first', replicate)).some((x) => x < 0)) hits++;
    }
    return hits / 4000;
  };
  const error = 4 * Math.sqrt(0.25 / 4000);
  expect(Math.abs(within({}, 10) - (1 - Math.exp(-10 / 10)))).toBeLessThan(error);
  // Weibull of shape 2 and scale 10, of which 6.5 years are known to have passed: S(16.5) / S(6.5)
  const aged = within({ returnInterval: { law: 'weibull', shape: 2, scale: 10 } }, 10);
  expect(Math.abs(aged - (1 - Math.exp(0.65 ** 2 - 1.65 ** 2)))).toBeLessThan(error);
});

test('depths have their spread and are never milder than other times', () => {
  const x = drawRenewal(
    {
      returnInterval: fixed(2),
      sinceLatest: 0,
      depth: -2,
      depthSpread: 1.5,
      length: fixed(1),
      between: -0.5,
    },
    40_000,
    1,
    uniformOf('depth'),
  );
  const depths = x.filter((_, i) => i % 2 === 0);
  expect(Math.max(...depths)).toBe(-0.5);
  // A normal of mean −2 and spread 1.5, cut at −0.5 (one spread above): that share is 0.158655.
  const cut = depths.filter((d) => d === -0.5).length / depths.length;
  expect(Math.abs(cut - 0.158655)).toBeLessThan(4 * Math.sqrt((0.159 * 0.841) / depths.length));
  expect(x.filter((_, i) => i % 2 === 1).every((d) => d === -0.5)).toBe(true);
});

test.each([1, 4])(
  'without memory, a drought is as likely in the first step as in any later one: %i steps a year',
  (perYear) => {
    const steps = 8;
    const dry = new Array<number>(steps).fill(0);
    const futures = 6000;
    for (let replicate = 0; replicate < futures; replicate++)
      drawRenewal(
        // Droughts of one step each, so that none that shows in the survey could still last.
        {
          returnInterval: exponential(6 / perYear),
          sinceLatest: 5,
          depth: -4,
          length: fixed(1 / perYear),
        },
        steps,
        perYear,
        uniformOf('stationary', replicate),
      ).forEach((x, step) => (dry[step] += x < 0 ? 1 : 0));
    // A step is dry when a drought began in the step's length of time up to its middle: 1 − e^(−1/6) = 0.1535.
    const chance = 1 - Math.exp(-1 / 6);
    const error = 4 * Math.sqrt((chance * (1 - chance)) / futures);
    for (const count of dry) expect(Math.abs(count / futures - chance)).toBeLessThan(error);
  },
);
