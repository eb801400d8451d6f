import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import type { Upload } from '#contract/uploads.ts';
import { ProblemNotice } from '#app/components/notice.tsx';
import { Blank } from '#app/components/blank.tsx';
import { WordButton } from '#app/components/word-button.tsx';
import { formatArea, formatCount, formatLength } from '#app/lib/formats.ts';
import { parseNumber } from '#app/lib/parse-number.ts';
import { keepUpload, uploadDeeds } from './uploads-query.ts';

/** The working grid that a first raster leads to, and the way to another. */
export function WorkingGridChoice({ upload }: { upload: Upload }) {
  const { plan, suggestedGrid, choices } = upload;
  const [typed, setTyped] = useState<{ epsg: string; cellSize: string }>();
  const queryClient = useQueryClient();
  const choose = useMutation({
    mutationFn: (grid: Upload['choices']['grid']) => uploadDeeds.choose(upload, { ...choices, grid }),
    onSuccess: (next) => {
      keepUpload(queryClient, next);
      setTyped(undefined);
    },
  });
  const grid = plan?.target ?? suggestedGrid?.grid;
  if (!grid) return null;
  const own = choices.grid === null;
  const epsg = typed && parseNumber(typed.epsg);
  const cellSize = typed && parseNumber(typed.cellSize);
  const wrong =
    typed &&
    (epsg === undefined || !Number.isInteger(epsg)
      ? 'Give the EPSG code as a whole number, such as 32631.'
      : cellSize === undefined || cellSize <= 0
        ? 'Give the side of a cell in metres, such as 1.'
        : undefined);
  return (
    <section aria-label="Working grid" className="border-t border-rule-2 pt-2">
      <h2 className="text-body">The working grid that follows</h2>
      <p>
        {suggestedGrid && own ? `${suggestedGrid.crs.name} ` : ''}EPSG:{grid.epsg}, {formatCount(grid.width)}{' '}
        × {formatCount(grid.height)} cells of {formatLength(grid.cellSize)},{' '}
        {formatArea(grid.width * grid.height * grid.cellSize ** 2)}.
        {own && suggestedGrid?.asInFile && ' These are the file’s own cells.'}
      </p>
      {own && suggestedGrid?.reasons.map((reason) => <p key={reason}>{reason}</p>)}
      {typed ? (
        <>
          <p className="leading-7">
            EPSG:{' '}
            <Blank
              label="EPSG code of the working grid"
              inputMode="numeric"
              value={typed.epsg}
              characters={6}
              onChange={(event) => setTyped({ ...typed, epsg: event.target.value })}
            />
            , cells of{' '}
            <Blank
              label="Side of a cell, m"
              inputMode="decimal"
              value={typed.cellSize}
              characters={6}
              onChange={(event) => setTyped({ ...typed, cellSize: event.target.value })}
            />{' '}
            m: a projected CRS in metres.
          </p>
          {wrong && <p className="text-note text-danger">{wrong}</p>}
          <div className="flex gap-x-4">
            <WordButton
              lined
              busy={choose.isPending}
              disabled={wrong !== undefined}
              onClick={() => {
                if (epsg !== undefined && cellSize !== undefined) choose.mutate({ epsg, cellSize });
              }}
            >
              Take this grid
            </WordButton>
            <WordButton lined onClick={() => setTyped(undefined)}>
              Leave it
            </WordButton>
          </div>
        </>
      ) : (
        <div className="flex flex-wrap gap-x-4">
          <WordButton
            lined
            onClick={() => setTyped({ epsg: String(grid.epsg), cellSize: String(grid.cellSize) })}
          >
            Another CRS or cell size
          </WordButton>
          {!own && (
            <WordButton lined busy={choose.isPending} onClick={() => choose.mutate(null)}>
              Back to the one proposed
            </WordButton>
          )}
        </div>
      )}
      {choose.error && <ProblemNotice error={choose.error} className="mt-1" />}
    </section>
  );
}
