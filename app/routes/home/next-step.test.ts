import { describe, expect, it } from 'vitest';
import type { SiteSummary } from '#contract/sites.ts';
import { nextStep, siteShare } from './next-step.ts';

const site = (more: Partial<SiteSummary>): SiteSummary => ({
  id: '1',
  teamId: '2',
  name: 'Sallow Reach',
  invented: true,
  createdAt: '2026-12-01T00:00:00Z',
  grid: { width: 10, height: 10, cellSize: 1, originX: 0, originY: 0, epsg: 32631 },
  parts: ['habitat', 'cover'],
  options: 2,
  runs: 1,
  ...more,
});

describe('nextStep', () => {
  it('asks for the layers that are missing, of those who may bring them', () => {
    const step = nextStep(site({ parts: ['refuge'] }));
    expect(step).toMatchObject({ to: '/sites/1/ground', words: 'needs a habitat layer and a cover layer' });
    expect(step?.roles).not.toContain('manager');
    expect(nextStep(site({ parts: ['habitat'] }))?.words).toBe('needs a cover layer');
  });
  it('counts Wait as nothing drawn', () =>
    expect(nextStep(site({ options: 1 }))?.to).toBe('/sites/1/options'));
  it('then asks for a run', () => expect(nextStep(site({ runs: 0 }))?.to).toBe('/sites/1/runs'));
  it('asks for nothing more once a run is there', () => expect(nextStep(site({}))).toBeUndefined());
  it('never asks a trainer', () => {
    for (const more of [{ parts: [] }, { options: 1 }, { runs: 0 }])
      expect(nextStep(site(more))?.roles).not.toContain('trainer');
  });
});

describe('siteShare', () => {
  it('rises with each part that is done', () => {
    const shares = [
      site({ parts: [], options: 1, runs: 0 }),
      site({ parts: ['habitat'], options: 1, runs: 0 }),
      site({ options: 1, runs: 0 }),
      site({ runs: 0 }),
      site({}),
    ].map(siteShare);
    expect(shares).toEqual([0, 0.25, 0.5, 0.75, 1]);
  });
});
