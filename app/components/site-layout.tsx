import type { ReactNode } from 'react';
import { classNames } from '#app/lib/class-names.ts';

/**
 * A page of a site: the staff on top, the map to the edges, notes in the margin, the yearline below. On a wide screen
 * the whole fits the window and only the margin scrolls; on a phone it is one column with the action at hand.
 */
export function SiteLayout(props: {
  /** the TideStaff */
  staff: ReactNode;
  /** words and blanks above the map */
  tools?: ReactNode;
  /** fills its place; the page without a map gives `sheet` or `children` instead */
  map?: ReactNode;
  /** words where the map would be: as wide, scrolling, with the same margin beside it */
  sheet?: ReactNode;
  margin?: ReactNode;
  yearline?: ReactNode;
  /** the one action that matters now, and what it will take */
  action?: ReactNode;
  children?: ReactNode;
}) {
  const hasMap = props.map !== undefined || props.sheet !== undefined;
  return (
    <div className={classNames('flex min-h-dvh flex-col', hasMap && 'lg:h-dvh lg:overflow-hidden')}>
      <SkipLink />
      {props.staff}
      <main id="main" tabIndex={-1} className="flex min-h-0 flex-1 flex-col pb-20 lg:pb-0">
        {hasMap ? (
          <MapPage {...props} />
        ) : (
          <div className="mx-auto w-full max-w-[1180px] flex-1 px-4 pt-6 pb-12 lg:px-6">
            {props.children}
            {props.action !== undefined && <ActionBar>{props.action}</ActionBar>}
          </div>
        )}
      </main>
    </div>
  );
}

/** On a phone time belongs to the map, so the yearline stands right under it; on a wide screen it spans the foot. */
function MapPage(props: Parameters<typeof SiteLayout>[0]) {
  return (
    <div className="grid min-h-0 flex-1 grid-cols-[minmax(0,1fr)] lg:grid-cols-[minmax(0,1fr)_360px] lg:grid-rows-[minmax(0,1fr)_auto]">
      <div className="flex min-h-0 min-w-0 flex-col">
        {props.tools !== undefined && (
          <div className="no-print border-b border-ink px-4 py-1.5 lg:pl-6">{props.tools}</div>
        )}
        {props.map === undefined ? (
          <div className="min-h-0 px-4 pt-5 pb-10 lg:flex-1 lg:overflow-y-auto lg:px-6">{props.sheet}</div>
        ) : (
          <div className="relative h-[48dvh] min-h-[300px] overflow-hidden bg-standing lg:h-auto lg:min-h-0 lg:flex-1">
            {props.map}
          </div>
        )}
      </div>
      {props.yearline !== undefined && (
        <div className="border-t border-ink lg:order-last lg:col-span-2">{props.yearline}</div>
      )}
      <aside
        aria-label="Notes on the map"
        className="flex min-h-0 flex-col border-t border-ink lg:border-t-0 lg:border-l"
      >
        <div className="min-h-0 flex-1 px-4 py-3 lg:overflow-y-auto lg:pr-7 lg:pl-6">{props.margin}</div>
        {props.action !== undefined && <ActionBar>{props.action}</ActionBar>}
      </aside>
    </div>
  );
}

/** Stands at the foot of the margin; on a phone at the foot of the screen. */
function ActionBar(props: { children: ReactNode }) {
  return (
    <div className="no-print flex flex-wrap items-center gap-x-3 gap-y-1 bg-ground px-4 py-2.5 max-lg:fixed max-lg:inset-x-0 max-lg:bottom-0 max-lg:z-30 max-lg:border-t max-lg:border-ink lg:pr-7 lg:pb-4 lg:pl-6">
      {props.children}
    </div>
  );
}

/** First stop of the tab key: past the head of the page. */
export function SkipLink() {
  return (
    <a
      href="#main"
      className="sr-only z-50 bg-sheet px-3 py-2 font-semibold focus:not-sr-only focus:absolute focus:top-1 focus:left-1"
    >
      Skip to the page
    </a>
  );
}
