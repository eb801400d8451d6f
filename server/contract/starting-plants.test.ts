import { expect, test } from 'vitest';
import { beliefQuantile, centralValue } from '#sim-core/belief/belief-quantile.ts';
import { parameters, rateNames } from '#sim-core/spec/parameters.ts';
import { plantSchema } from './plants.ts';
import { startingPlants } from './starting-plants.ts';

test('there are several, each under a key of its own', () => {
  expect(startingPlants.length).toBeGreaterThanOrEqual(5);
  expect(new Set(startingPlants.map(({ key }) => key)).size).toBe(startingPlants.length);
});

test.each(startingPlants.map((profile) => [profile.key, profile] as const))(
  '%s says of every rate where it comes from, and what is guessed is said to be',
  (_, { plant }) => {
    expect(plantSchema.parse(plant)).toEqual(plant);
    for (const name of rateNames) {
      const [source, belief] = [plant.sources[name], plant.beliefs[name]];
      expect(source?.source, name).toMatch(/./);
      if (source!.sure === 'expert guess') expect(source!.source).toMatch(/guess|[Ff]rom memory/);
      else expect(source!.source, name).toMatch(/\b(19|20)\d\d\b/);
      // The value of a single run follows from the belief, and what was published lies within it, roughly at least.
      if (!belief) continue;
      expect(plant.rates[name] / centralValue(belief, parameters[name])).toBeCloseTo(1, 3);
      const quantile = beliefQuantile(belief, parameters[name]);
      if (source!.range) expect(quantile(0.01)).toBeLessThan(source!.range.high);
      if (source!.range) expect(quantile(0.99)).toBeGreaterThan(source!.range.low);
    }
  },
);
