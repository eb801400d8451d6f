import { useEffect, useState } from 'react';
import { startRun } from '#app/workers/run-client.ts';
import { yearRecords, type YearRecord } from '#app/yearline/year-records.ts';
import type { SeriesRow } from '#sim-core/spec/run-result.ts';
import { pictureGrid, pictureGround, pictureSpec } from './picture-ground.ts';

export interface PictureRun {
  frames: ReadonlyMap<number, Uint8Array>;
  records: readonly YearRecord[];
  /** the browser would not run it: the page then shows the surveyed ground alone */
  failed: boolean;
}

const nothing: PictureRun = { frames: new Map(), records: [], failed: false };

/** Runs the picture's future with the engine itself, in a worker, and hands out its years as they come. */
export function usePictureRun(): PictureRun {
  const [run, setRun] = useState(nothing);
  useEffect(() => {
    const frames = new Map<number, Uint8Array>();
    const rows: SeriesRow[] = [];
    const handle = startRun(
      { spec: pictureSpec(), grid: pictureGrid, ground: pictureGround() },
      {
        onYear: ({ year, rows: more, frame }) => {
          rows.push(...more);
          if (frame) frames.set(year, frame);
          setRun({ frames: new Map(frames), records: yearRecords(rows), failed: false });
        },
      },
    );
    let left = false;
    handle.result.catch(() => {
      if (!left) setRun((before) => ({ ...before, failed: true }));
    });
    return () => {
      left = true;
      handle.cancel();
    };
  }, []);
  return run;
}
