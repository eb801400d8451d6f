import type { ReactNode } from 'react';
import { classNames } from '#app/lib/class-names.ts';
import { useNarrow } from '#app/lib/use-media-query.ts';

/**
 * A page of a site: the staff on top, the map to the edges, notes in the margin, the yearline below. On a wide screen
 * the whole fits the window and one area scrolls: the margin beside a map, or a sheet of words together with its margin.
 * On a phone it is one column with the action at hand. Whatever scrolls is positioned, so that what is placed inside
 * it, words for the ear above all, scrolls with it and never stretches the page.
 */
export function SiteLayout(props: {
  /** the TideStaff */
  staff: ReactNode;
  /** words and blanks above the map, on a phone below it */
  tools?: ReactNode;
  /** more of these words, below them */
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
 * On a phone the map comes first, then its tools and the yearline, and the parts of the margin follow each other, with the
 * action at the screen’s foot. On a wide screen tools stand above the map, the yearline spans the foot, and the margin is
 * a column of its own.
 */
function MapPage(props: Parameters<typeof SiteLayout>[0]) {
  const { dock } = props;
  const narrow = useNarrow();
  if (props.map === undefined) return <SheetPage {...props} />;
  const tools = <Tools {...props} below={narrow} />;
  return (
    <div className="flex min-h-0 flex-1 flex-col lg:grid lg:grid-cols-[minmax(0,1fr)_360px] lg:grid-rows-[minmax(0,1fr)_auto]">
      <div className="flex min-h-0 min-w-0 flex-col">
        {!narrow && tools}
        <div className="relative h-[48dvh] min-h-[300px] overflow-hidden bg-ground lg:h-auto lg:min-h-0 lg:flex-1">
          {props.map}
        </div>
        {narrow && tools}
      </div>
      {props.yearline !== undefined && (
        <div className="border-t border-ink lg:order-last lg:col-span-2">{props.yearline}</div>
      )}
      <aside
        aria-label="Notes on the map"
        className="flex min-h-0 flex-col border-ink max-lg:contents lg:border-l"
      >
        {dock !== undefined && (
          <div className="relative border-ink px-4 py-2 max-lg:border-t lg:order-1 lg:max-h-[45%] lg:shrink-0 lg:overflow-y-auto lg:border-t lg:border-rule lg:pr-7 lg:pl-6">
            {dock}
          </div>
        )}
        <div className="relative min-h-0 flex-1 border-ink px-4 py-3 max-lg:border-t lg:overflow-y-auto lg:pr-7 lg:pl-6">
          {props.margin}
        </div>
        {props.action !== undefined && <ActionBar className="lg:order-2">{props.action}</ActionBar>}
      </aside>
    </div>
  );
}

/** Words in the place of the map. They scroll together with their margin, which stays in sight from its end on. */
function SheetPage(props: Parameters<typeof SiteLayout>[0]) {
  return (
    <div className="relative flex min-h-0 flex-1 flex-col lg:grid lg:grid-cols-[minmax(0,1fr)_360px] lg:overflow-y-auto lg:[container-type:size]">
      <div className="min-w-0">
        <Tools {...props} below={false} />
        <div className="px-4 pt-5 pb-10 lg:px-6">{props.sheet}</div>
      </div>
      <aside
        aria-label="Notes beside the sheet"
        className="flex flex-col border-ink max-lg:contents lg:sticky lg:bottom-0 lg:min-h-[100cqh] lg:self-end lg:border-l"
      >
        <div className="flex-1 border-ink px-4 py-3 max-lg:border-t lg:pr-7 lg:pl-6">{props.margin}</div>
        {props.action !== undefined && (
          <ActionBar className="lg:sticky lg:bottom-0">{props.action}</ActionBar>
        )}
      </aside>
    </div>
  );
}

function Tools({
  tools,
  sentence,
  below,
}: Pick<Parameters<typeof SiteLayout>[0], 'tools' | 'sentence'> & { below: boolean }) {
  if (tools === undefined && sentence === undefined) return null;
  return (
    <div
      className={classNames(
        'no-print grid gap-y-1 border-ink px-4 py-1.5 lg:pl-6',
        below ? 'border-t' : 'border-b',
      )}
    >
      {tools}
      {sentence}
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
