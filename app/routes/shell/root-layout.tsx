import { useEffect, useRef } from 'react';
import { Outlet, ScrollRestoration, useLocation, useNavigation } from 'react-router-dom';

/** Stands around every page: shows that a page is on its way, and moves focus to it once it is there. */
export function RootLayout() {
  useFocusOnNewPage();
  const waiting = useNavigation().state !== 'idle';
  return (
    <>
      {waiting && <div aria-hidden="true" className="busy-ticks fixed inset-x-0 top-0 z-50 h-[5px]" />}
      <Outlet />
      <ScrollRestoration />
    </>
  );
}

/** After a change of page, keyboard and screen reader start at its main part and not where the old link was. */
function useFocusOnNewPage(): void {
  const { pathname } = useLocation();
  const shown = useRef(pathname);
  useEffect(() => {
    if (shown.current === pathname) return;
    shown.current = pathname;
    // A page that puts the cursor into its first field keeps it there.
    if (document.activeElement?.closest('main')) return;
    document.querySelector('main')?.focus({ preventScroll: true });
  }, [pathname]);
}
