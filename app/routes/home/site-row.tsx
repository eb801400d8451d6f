import { Link } from 'react-router-dom';
import { StaffRule } from '#app/components/staff-rule.tsx';
import { formatArea, formatCounted, formatDate, formatLength } from '#app/lib/formats.ts';
import type { RunSummary } from '#contract/runs.ts';
import type { SiteSummary } from '#contract/sites.ts';
import { nextStep, siteShare } from './next-step.ts';
import { SitePicture } from './site-picture.tsx';

/** One site: its name, its ground, how far the work on it is. The whole row leads to it. */
export function SiteRow({ site, latest }: { site: SiteSummary; latest: RunSummary | undefined }) {
  const { width, height, cellSize } = site.grid;
  const next = nextStep(site);
  return (
    <li className="group relative grid gap-x-8 gap-y-3 border-t border-rule-2 py-4 first:border-t-0 md:grid-cols-[minmax(0,5fr)_minmax(0,6fr)]">
      <SitePicture site={site} latest={latest} />
      <div className="flex min-w-0 flex-col justify-between gap-4">
        <div>
          <Link
            to={next?.to ?? `/sites/${site.id}/runs`}
            className="text-title font-strong no-underline after:absolute after:inset-0 group-hover:underline"
          >
            {site.name}
          </Link>
          <p className="text-note text-ink-2">
            {site.invented ? 'Invented, ' : ''}since {formatDate(site.createdAt)}
          </p>
          <p className="mt-2 text-note text-ink-2">
            {formatArea(width * height * cellSize ** 2)} in cells of {formatLength(cellSize)}
            <br />
            <span className="font-mono text-axis">
              {width} × {height} EPSG:{site.grid.epsg}
            </span>
          </p>
        </div>
        <div>
          <p className="mb-1 flex justify-between gap-4 text-note">
            <span>
              {formatCounted(site.options, 'option')}, {formatCounted(site.runs, 'run')}
            </span>
            <span className="text-ink-2">{next?.words ?? 'ready to run again'}</span>
          </p>
          <div className="border-b border-ink">
            <StaffRule share={siteShare(site)} />
          </div>
        </div>
      </div>
    </li>
  );
}
