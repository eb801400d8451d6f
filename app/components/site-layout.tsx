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
  /** more of these words: below them on a wide screen, below the map on a phone, where the map comes first */
  sentence?: ReactNode;
  /** fills its place; the page without a map gives `sheet` or `children` instead */
  map?: ReactNode;
  /** words where the map would be: as wide, scrolling, with the same margin beside it */
  sheet?: ReactNode;
  margin?: ReactNode;
  /** what of the margin stays in view while the rest of it scrolls; on a phone it comes right after the map */
  dock?: ReactNode;
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
      <main id="main" tabIndex={-1} className="flex min-h-0 flex-1 flex-col lg:pb-0">
        {hasMap ? (
          <MapPage {...props} />
        ) : (
          <div className="mx-auto w-full max-w-[1180px] flex-1 px-4 pt-6 lg:px-6 lg:pb-12">
            {props.children}
            {props.action !== undefined && <ActionBar className="max-lg:-mx-4">{props.action}</ActionBar>}
          </div>
        )}
      </main>
    </div>
  );
}

/**
 * On a phone time belongs to the map, so the yearline stands right under it; on a wide screen it spans the foot. There
 * the margin is a column of its own; on a phone its parts follow each other, and the action sticks to the screen's foot.
 */
function MapPage(props: Parameters<typeof SiteLayout>[0]) {
  const { tools, sentence, dock } = props;
  return (
    <div className="flex min-h-0 flex-1 flex-col lg:grid lg:grid-cols-[minmax(0,1fr)_360px] lg:grid-rows-[minmax(0,1fr)_auto]">
      <div className="flex min-h-0 min-w-0 flex-col">
        {tools !== undefined && (
          <div
            className={classNames(
              'no-print border-ink px-4 pt-1.5 max-lg:border-b max-lg:pb-1.5 lg:pl-6',
              sentence === undefined && 'lg:border-b lg:pb-1.5',
            )}
          >
            {tools}
          </div>
        )}
        {sentence !== undefined && (
          <div className="no-print border-ink px-4 py-1.5 max-lg:order-last max-lg:border-t lg:border-b lg:pt-1 lg:pl-6">
            {sentence}
          </div>
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
        className="flex min-h-0 flex-col border-ink max-lg:contents lg:border-l"
      >
        {dock !== undefined && (
          <div className="border-ink px-4 py-2 max-lg:border-t lg:order-1 lg:max-h-[45%] lg:shrink-0 lg:overflow-y-auto lg:border-t lg:border-rule lg:pr-7 lg:pl-6">
            {dock}
          </div>
        )}
        <div className="min-h-0 flex-1 border-ink px-4 py-3 max-lg:border-t lg:overflow-y-auto lg:pr-7 lg:pl-6">
          {props.margin}
        </div>
        {props.action !== undefined && <ActionBar className="lg:order-2">{props.action}</ActionBar>}
      </aside>
    </div>
  );
}

/** Stands at the foot of the margin; on a phone it sticks to the foot of the screen, and covers nothing that is last. */
function ActionBar(props: { children: ReactNode; className?: string }) {
  return (
    <div
      className={classNames(
        'no-print flex flex-wrap items-center gap-x-3 gap-y-1 bg-ground px-4 py-2.5 max-lg:sticky max-lg:bottom-0 max-lg:z-30 max-lg:border-t max-lg:border-ink lg:pr-7 lg:pb-4 lg:pl-6',
        props.className,
      )}
    >
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
