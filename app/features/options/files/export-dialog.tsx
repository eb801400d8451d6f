import { useState } from 'react';
import { ringsOf } from '#sim-core/process/area-cells.ts';
import {
  exportCrewCsv,
  exportCrewGpx,
  exportGeoJson,
  exportPoints,
  mostCrewPoints,
} from '#contract/option-files.ts';
import type { Option } from '#contract/options.ts';
import type { Work } from '#contract/works.ts';
import { workTitles } from '#contract/work-titles.ts';
import { Blank, BlankSelect } from '#app/components/blank.tsx';
import { Button } from '#app/components/button.tsx';
import { Dialog, DialogActions } from '#app/components/dialog.tsx';
import { Notice } from '#app/components/notice.tsx';
import { WordAnchor } from '#app/components/word-button.tsx';
import { endpointUrl } from '#app/lib/api-client.ts';
import { formatCount } from '#app/lib/formats.ts';
import { parseNumber } from '#app/lib/parse-number.ts';

/** An option as files: for other programs, and for the crew that builds it. */
export function ExportDialog(props: {
  option: Option;
  /** the drawing on the page holds more than what was saved */
  unsaved: boolean;
  onClose: () => void;
}) {
  const { option } = props;
  const params = { siteId: option.siteId, optionId: option.id };
  const titles = workTitles(option.works);
  const outlines = option.works
    .filter((work) => 'area' in work && work.area.shape === 'polygon')
    .map((work) => titles.get(work.id) ?? '');
  return (
    <Dialog
      open
      wide
      onOpenChange={(open) => {
        if (!open) props.onClose();
      }}
      title={`Files of ${option.name}`}
    >
      {props.unsaved && (
        <Notice className="mt-3">The files hold what was saved last, without your changes.</Notice>
      )}
      <h3 className="mt-3 font-bold">For other programs</h3>
      <p className="flex flex-wrap items-baseline gap-x-4">
        <WordAnchor href={endpointUrl(exportGeoJson, { params })} download>
          GeoJSON, longitude and latitude
        </WordAnchor>
        <WordAnchor href={endpointUrl(exportGeoJson, { params, query: { crs: 'site' } })} download>
          GeoJSON, CRS of the site
        </WordAnchor>
        <WordAnchor href={endpointUrl(exportPoints, { params })} download>
          CSV of points
        </WordAnchor>
      </p>
      <p className="mt-1 text-note text-ink-2">
        GeoJSON holds everything and can be read in again.
        {outlines.length > 0 &&
          ` The CSV holds points alone and leaves out ${outlinesInWords(outlines)}, drawn as ${outlines.length === 1 ? 'an outline' : 'outlines'}: take the GeoJSON for ${outlines.length === 1 ? 'it' : 'them'}.`}
      </p>
      <CrewFiles option={option} />
      <DialogActions>
        <Button onClick={props.onClose}>Close</Button>
      </DialogActions>
    </Dialog>
  );
}

/** `Fence 1`, `Fence 1 and Loss 1`, `Fence 1, Fence 2, Loss 1 and 4 more` */
function outlinesInWords(names: readonly string[]): string {
  const shown = names.length > 4 ? [...names.slice(0, 3), `${names.length - 3} more`] : names;
  return shown.length === 1 ? shown[0] : `${shown.slice(0, -1).join(', ')} and ${shown[shown.length - 1]}`;
}

/** Places that a crew goes to for one of the works. */
function pointsOf(work: Work): number {
  if (work.kind === 'clumps') return work.points.length;
  return 'area' in work && work.area.shape === 'polygon'
    ? ringsOf(work.area).reduce((sum, ring) => sum + ring.length, 0)
    : 1;
}

function CrewFiles({ option }: { option: Option }) {
  const works = option.works.filter((work) => work.kind !== 'loss');
  const years = [...new Set(works.map((work) => work.year))].sort((a, b) => a - b);
  const [year, setYear] = useState('');
  const [start, setStart] = useState<'west' | 'place'>('west');
  const [place, setPlace] = useState({ x: '', y: '' });
  const [x, y] = [parseNumber(place.x), parseNumber(place.y)];
  const placed = x !== undefined && y !== undefined;
  const points = works
    .filter((work) => year === '' || work.year === Number(year))
    .reduce((sum, work) => sum + pointsOf(work), 0);
  const params = { siteId: option.siteId, optionId: option.id };
  const query = {
    ...(year !== '' && { year: Number(year) }),
    ...(start === 'place' && placed && { startX: x, startY: y }),
  };
  if (works.length === 0)
    return (
      <>
        <h3 className="mt-4 font-bold">For the crew</h3>
        <p className="text-note text-ink-2">There are no works to go to.</p>
      </>
    );
  return (
    <>
      <h3 className="mt-4 font-bold">For the crew</h3>
      <p className="leading-8">
        The places of{' '}
        <BlankSelect
          label="Works of which year"
          value={year}
          onChange={(event) => setYear(event.target.value)}
        >
          <option value="">all years</option>
          {years.map((one) => (
            <option key={one} value={one}>
              {one}
            </option>
          ))}
        </BlankSelect>{' '}
        in the order of a short round, from{' '}
        <BlankSelect
          label="Where the round starts"
          value={start}
          onChange={(event) => setStart(event.target.value as 'west' | 'place')}
        >
          <option value="west">its western end</option>
          <option value="place">a place</option>
        </BlankSelect>
        {start === 'place' && (
          <>
            {' '}
            at E{' '}
            <Blank
              label="Easting of the start, m"
              inputMode="decimal"
              characters={9}
              value={place.x}
              onChange={(event) => setPlace({ ...place, x: event.target.value })}
            />{' '}
            N{' '}
            <Blank
              label="Northing of the start, m"
              inputMode="decimal"
              characters={10}
              value={place.y}
              onChange={(event) => setPlace({ ...place, y: event.target.value })}
            />
          </>
        )}
        .
      </p>
      {points > mostCrewPoints ? (
        <p className="text-note text-danger">
          {formatCount(points)} points; a list for a crew holds at most {formatCount(mostCrewPoints)}. Choose
          one year, or split the option.
        </p>
      ) : start === 'place' && !placed ? (
        <p className="text-note text-ink-2">
          Fill in both coordinates of the start, in metres of the site’s CRS.
        </p>
      ) : (
        <p className="flex flex-wrap items-baseline gap-x-4">
          <WordAnchor href={endpointUrl(exportCrewGpx, { params, query })} download>
            GPX for receivers
          </WordAnchor>
          <WordAnchor href={endpointUrl(exportCrewCsv, { params, query })} download>
            CSV for lists
          </WordAnchor>
        </p>
      )}
      <p className="mt-1 text-note text-ink-2">
        In WGS 84: mounds, every point of clumps, the corners of outlines. The round is short, not the
        shortest, and knows nothing of creeks. Places are planned, not surveyed; a receiver may be metres off.
        Work between the tides needs tide, weather and mud precautions. Follow local codes and licensed
        practice.
      </p>
    </>
  );
}
