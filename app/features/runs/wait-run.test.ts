// @vitest-environment node
import { describe, expect, it } from 'vitest';
import type { RunSummary } from '#contract/runs.ts';
import { formatShare } from '#app/lib/formats.ts';
import { composeRunSpec } from './compose-run-spec.ts';
import { checkWords, recoveryWords, recoveryYears, statusWords } from './run-words.ts';
import { randomSeed } from './random-seed.ts';
import type { LiveRun } from './run-manager.ts';
import { siteFixture } from './testing/site-fixture.ts';
import { sameOutlook, waitRunsFor } from './wait-run.ts';

const summary = (more: Partial<RunSummary>) =>
  ({
    id: 'r1',
    optionId: 'wait',
    status: 'finished',
    seed: 's',
    mode: 'counts',
    surveyYear: 2026,
    years: 34,
    frames: 35,
    recoveredYear: null,
    lostYear: null,
    check: null,
    ...more,
  }) as RunSummary;
const mine = summary({ id: 'mine', optionId: 'mounds' });
const specOf = (seed: string, x?: number) =>
  composeRunSpec(
    siteFixture(),
    {
      works:
        x === undefined ? [] : [{ kind: 'mound', year: 2028, x, y: 1998, radius: 1, strength: 1, halo: 0 }],
    },
    { mode: 'counts', seed },
  ).spec!;

describe('the run of Wait beside another', () => {
  it('shares outlook, mode and seed, and has finished', () => {
    const good = summary({ id: 'good' });
    const others = [
      summary({ id: 'a', status: 'stopped' }),
      summary({ id: 'b', seed: 't' }),
      summary({ id: 'c', years: 20 }),
      summary({ id: 'd', mode: 'mean-field' }),
      summary({ id: 'e', optionId: 'other' }),
    ];
    const older = summary({ id: 'older' });
    expect(waitRunsFor(mine, [...others, good, older], 'wait')).toEqual([good, older]);
    expect(waitRunsFor(mine, others, 'wait')).toEqual([]);
    expect(waitRunsFor(good, [summary({ id: 'x' })], 'wait')).toEqual([]);
  });
  it('differs in nothing but its works', () => {
    expect(sameOutlook(specOf('s', 1002), specOf('s'))).toBe(true);
    expect(sameOutlook(specOf('s', 1002), specOf('t'))).toBe(false);
  });
  it('lives through the same future of an outlook that draws its weather', () => {
    const site = siteFixture();
    const drawn = { kind: 'palmer-type', standardDeviation: 2 } as const;
    const outlook = { ...site.outlook, drawn };
    const spec = (future?: number) =>
      composeRunSpec(site, { works: [] }, { mode: 'counts', seed: 's', outlook, future }).spec!;
    expect(sameOutlook(spec(2), spec(2))).toBe(true);
    expect(sameOutlook(spec(2), spec(3))).toBe(false);
    expect(sameOutlook(spec(1), spec())).toBe(false);
  });
});

describe('a run in words', () => {
  it('says where it stands', () => {
    const running = summary({ status: 'running', frames: 12 });
    expect(statusWords(running, undefined)).toBe('left, or running in another tab; 12 of 35 years stored');
    const live = {
      phase: 'running',
      repeat: false,
      year: 2038,
      surveyYear: 2026,
      years: 34,
      progress: { stepsDone: 12, steps: 34, secondsLeft: 42 },
    } as LiveRun;
    expect(statusWords(running, live)).toBe('running, year 12 of 34, 45 s left');
    expect(statusWords(mine, { ...live, repeat: true, phase: 'done' })).toBe('finished');
  });
  it('says what came of it', () => {
    expect(recoveryWords(mine)).toBe('still open in 2060');
    const relapsed = summary({ recoveredYear: 2048, lostYear: 2049 });
    expect(recoveryWords(relapsed)).toBe('recovered in 2048, lost again in 2049');
    expect(recoveryWords(relapsed, 0.9)).toBe(`reached ${formatShare(0.9)} in 2048, lost again in 2049`);
    expect(recoveryYears(relapsed)).toBe('2048, lost again in 2049');
    expect(recoveryYears(summary({ recoveredYear: 2059 }))).toBe('2059');
    expect(recoveryWords(summary({ recoveredYear: 2046.25 }))).toBe('recovered in 2047');
    expect(recoveryWords(summary({ status: 'stopped' }))).toBeUndefined();
    expect(checkWords(mine)).toBe('not run again yet');
    const check = { at: '', by: '', agreed: false, engineVersion: '' };
    expect(checkWords(summary({ check }))).toBe('differs');
  });
});

describe('randomSeed', () => {
  it('can be read out, and follows its source of chance', () => {
    expect(randomSeed(() => 0)).toBe('ebb-heron-0000');
    expect(randomSeed((n) => n - 1)).toBe('moon-seal-9999');
    expect(randomSeed()).toMatch(/^[a-z]+-[a-z]+-\d{4}$/);
  });
});
