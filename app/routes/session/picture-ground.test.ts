import { describe, expect, it } from 'vitest';
import { cellAt, cellIndex } from '#sim-core/grid/grid.ts';
import {
  pictureGrid,
  pictureGround,
  pictureSpec,
  pictureYears,
  planned,
  survivors,
} from './picture-ground.ts';

describe('the picture at the door', () => {
  it('is the same on every visit', () => {
    const [once, again] = [pictureGround(), pictureGround()];
    expect(once.cover.every((share, i) => share === again.cover[i])).toBe(true);
    expect(new Set(once.cover).size).toBeGreaterThan(100);
  });

  it('shows what its words say: survivors that stand, flags on ground that died', () => {
    const { cover, refuge } = pictureGround();
    const at = ({ column, row }: { column: number; row: number }) => cellIndex(pictureGrid, column, row);
    expect(survivors.length).toBeGreaterThan(5);
    expect(planned.length).toBeGreaterThan(5);
    for (const spot of survivors) expect([cover[at(spot)] > 0.7, refuge[at(spot)]]).toEqual([true, 255]);
    for (const spot of planned) expect(cover[at(spot)]).toBe(0);
  });

  it('plants each flag where the run places its mound', () => {
    const mounds = pictureSpec().actions.flatMap((action) =>
      action.kind === 'mound' ? [cellAt(pictureGrid, action.x, action.y)] : [],
    );
    expect(mounds).toEqual(planned);
  });

  it('reports the moments that are shown', () =>
    expect(pictureSpec().reportYears).toEqual(expect.arrayContaining([...pictureYears.shown])));
});
