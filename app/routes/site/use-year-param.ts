import { useEffect, useState } from 'react';
import { useSearchParams } from 'react-router-dom';
import { useSearchPatch } from '#app/lib/use-search-patch.ts';

const settleAfter = 300;

/**
 * The year under the playhead, which the address keeps as `?year=`. It is written there once the playhead rests: a
 * browser refuses an address that changes with every step of a drag.
 *
 * @param usual year to show where the address names none that can be shown
 */
export function useYearParam(
  first: number,
  last: number,
  usual: number,
): { year: number; chosen: boolean; setYear: (year: number | undefined) => void } {
  const [search] = useSearchParams();
  const patchSearch = useSearchPatch();
  const asked = Number(search.get('year') ?? NaN);
  const [moved, setMoved] = useState<{ to: number | undefined }>();
  const wanted = moved ? moved.to : asked;

  useEffect(() => {
    if (!moved) return undefined;
    const timer = setTimeout(() => {
      patchSearch({ year: moved.to === undefined ? undefined : String(moved.to) });
    }, settleAfter);
    return () => clearTimeout(timer);
  }, [moved, patchSearch]);

  const chosen = wanted !== undefined && Number.isInteger(wanted) && wanted >= first && wanted <= last;
  return {
    year: chosen ? wanted : Math.min(last, Math.max(first, usual)),
    chosen,
    setYear: (to) => setMoved({ to }),
  };
}
