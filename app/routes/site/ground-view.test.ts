import { expect, it } from 'vitest';
import { engineMaps, readView, viewKey } from './ground-view.ts';

it('stands in the address and is read from it', () => {
  for (const map of engineMaps)
    expect(readView(viewKey({ of: 'engine', map }), ['cover'])).toEqual({ of: 'engine', map });
  expect(readView('cover', ['habitat', 'cover'])).toEqual({ of: 'layer', part: 'cover' });
});

it('falls back to the first layer, or to nothing', () => {
  for (const asked of [null, 'refuge', 'engine-tide'])
    expect(readView(asked, ['habitat'])).toEqual({ of: 'layer', part: 'habitat' });
  expect(readView('engine-capacity', [])).toBeUndefined();
});
