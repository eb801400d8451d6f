import { describe, expect, it } from 'vitest';
import { beliefLaws } from '#sim-core/spec/belief.ts';
import { allParameters, anyRateNames } from '#sim-core/spec/all-parameters.ts';
import { parameters } from '#sim-core/spec/parameters.ts';
import { beliefForms, proposeBelief, readBelief, startBelief } from './belief-draft.ts';

const rate = parameters.lateralSpread;

describe('a belief that is typed', () => {
  it('comes back as it was saved, whatever its law', () => {
    for (const belief of [
      { law: 'triangular', low: 0.2, mode: 0.5, high: 1.5 },
      { law: 'beta', alpha: 2, beta: 3, low: 0.1, high: 2 },
      { law: 'values', values: [0.4, 0.8, 1.2] },
    ] as const)
      expect(readBelief(startBelief({ ...belief } as never), rate)).toEqual({ belief });
  });

  it('takes values as they are pasted, with decimal commas, and names the one that is none', () => {
    const paste = (values: string) => readBelief({ law: 'values', typed: { values } }, rate);
    expect(paste('0,4\t0,8\n1.2; 2').belief).toEqual({ law: 'values', values: [0.4, 0.8, 1.2, 2] });
    expect(paste('0.4, 0.8').belief).toEqual({ law: 'values', values: [0.4, 0.8] });
    expect(paste('0.4\nmud').errors?.values).toMatch(/Found “mud” as value 2/);
    expect(paste('0.4').errors?.values).toMatch(/Found 1 values/);
    expect(paste('0.4\n40').errors?.values).toMatch(/Value 2: Found 40/);
  });

  it('says what is wrong at each blank', () => {
    const typed = { low: 'x', mode: '0,5', high: '' };
    const wrong = readBelief({ law: 'triangular', typed }, rate).errors!;
    expect(Object.keys(wrong)).toEqual(['low', 'high']);
    const turned = readBelief({ law: 'uniform', typed: { low: '2', high: '1' } }, rate).errors!;
    expect(turned.high).toMatch(/expected more than the low value/);
  });

  it('is proposed within the range of every rate, for every law that needs no data', () => {
    expect(Object.keys(beliefForms)).toEqual([...beliefLaws]);
    for (const name of anyRateNames)
      for (const law of beliefLaws.filter((other) => other !== 'values')) {
        const { default: start, max } = allParameters[name];
        if (law === 'log-normal' && !(max > 0)) continue;
        expect(
          readBelief(proposeBelief(law, start, allParameters[name]), allParameters[name]).errors,
          `${name} ${law}`,
        ).toBe(undefined);
      }
  });
});
