import { describe, expect, it } from 'vitest';
import { createRun } from '#sim-core/index.ts';
import { defaultRates, type Rates } from '#sim-core/spec/parameters.ts';
import { runSpecSchema } from '#sim-core/spec/run-spec.ts';
import { fillFrom, implications, yearlyLoss, yearsToReach } from './implied.ts';

const rates = (change: Partial<Rates> = {}): Rates => ({ ...defaultRates, ...change });

describe('implications', () => {
  it('gives the front speed asked for, and the time to double', () => {
    const { kernel, doublingYears, problems } = implications(rates({ fillRate: 0.5 }), 0.5, 1);
    expect(problems).toEqual([]);
    expect(kernel!.frontSpeed).toBeCloseTo(defaultRates.lateralSpread, 1);
    expect(doublingYears).toBeCloseTo(1.386294, 5);
  });

  it('hands on the engine’s refusal at the field that is wrong', () => {
    const refused = implications(rates({ lateralSpread: 0.005, fillRate: 10 }), 10, 1);
    expect(refused.kernel).toBeUndefined();
    expect(refused.fill).toEqual([]);
    expect(refused.problems).toMatchObject([{ field: 'rates.lateralSpread' }]);
    expect(refused.halfLoss.open).toBe(defaultRates.tolerance);
  });

  it('starts from what it says, grows at the rate r at first and settles where the theory says', () => {
    const slow = implications(rates({ fillRate: 0.2 }), 1, 1);
    expect(slow.fill[0]).toBeCloseTo(fillFrom, 6);
    expect(slow.fill[1] / slow.fill[0]).toBeCloseTo(Math.exp(0.2), 1);
    const { fill, settles } = implications(rates(), 1, 1);
    expect(fill.at(-1)).toBeCloseTo(settles, 2);
    expect(yearsToReach(fill, settles * 2)).toBeUndefined();
    expect(yearsToReach(fill, fill[7])).toBe(7);
  });

  it('shifts the index of half loss by place: up on exposed ground, down under shelter', () => {
    const { halfLoss } = implications(
      rates({ tolerance: -2, exposureShift: 1, refugeShift: 3, neighbourShift: 0.5 }),
      1,
      1,
    );
    expect(halfLoss).toEqual({ open: -2, exposed: -1, refuge: -5, neighbours: -2.5 });
  });
});

describe('yearlyLoss', () => {
  it('is what the engine loses in one year on a lone cell of open ground', () => {
    const some = rates({ backgroundLoss: 0.2, neighbourShift: 0, fillRate: 0.01, carryOver: 1 });
    const index = -2.1;
    const run = createRun({
      spec: runSpecSchema.parse({
        version: 1,
        mode: 'mean-field',
        seed: 's',
        surveyYear: 2000,
        years: 1,
        droughtIndex: index,
        rates: { ...some, lateralSpread: 0.05 },
        layers: { cover: 0.5 },
      }),
      grid: { width: 1, height: 1, cellSize: 1, originX: 0, originY: 0, epsg: 0 },
      ground: {
        capacity: Uint8Array.of(255),
        vigour: Uint8Array.of(255),
        exposure: Uint8Array.of(0),
        refuge: Uint8Array.of(0),
        fence: Uint8Array.of(0),
        cover: Float32Array.of(0.5),
      },
    });
    const [row] = run.nextYear()!.rows;
    const lost = row.lostToDrought + row.lostToBackground;
    expect(lost / (lost + row.coveredArea)).toBeCloseTo(yearlyLoss(some, some.tolerance, index), 4);
  });

  it('takes half of the drought loss at the half-loss index', () => {
    expect(yearlyLoss({ backgroundLoss: 0, droughtLoss: 2, lossWidth: 0.3 }, -2, -2)).toBeCloseTo(
      1 - Math.exp(-1),
      12,
    );
  });
});
