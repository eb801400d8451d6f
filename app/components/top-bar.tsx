import type { ReactNode } from 'react';
import { Link } from 'react-router-dom';

/** Head of the pages that belong to no site: the name of the product, where one can go, who is signed in. */
export function TopBar(props: {
  links?: readonly { to: string; label: string; current: boolean }[];
  person?: ReactNode;
}) {
  return (
    <header className="no-print border-b border-ink">
      <div className="mx-auto flex min-h-14 max-w-[1180px] flex-wrap items-center gap-x-6 px-4 lg:px-6">
        <Link
          to="/"
          className="flex min-h-11 items-center gap-2 text-lead font-bold tracking-tight no-underline"
        >
          <Flag /> Foothold
        </Link>
        {props.links !== undefined && (
          <nav
            aria-label="Foothold"
            className="flex min-w-0 flex-wrap gap-x-5 max-md:order-last max-md:w-full"
          >
            {props.links.map((link) => (
              <Link
                key={link.to}
                to={link.to}
                aria-current={link.current ? 'page' : undefined}
                className="flex min-h-7 touch:min-h-11 items-center border-b-2 border-transparent px-0.5 no-underline hover:border-rule aria-[current=page]:border-ink aria-[current=page]:font-bold"
              >
                {link.label}
              </Link>
            ))}
          </nav>
        )}
        <div className="ml-auto">{props.person}</div>
      </div>
    </header>
  );
}

/** The pin flag that stands for the product. */
function Flag() {
  return (
    <svg width="14" height="20" viewBox="0 0 14 20" aria-hidden="true">
      <path d="M2.5 2h10v7h-10z" className="fill-flag stroke-ink" />
      <path d="M2.5 1.5v16" strokeWidth="2" className="stroke-ink" />
      <circle cx="2.5" cy="17.5" r="2" className="fill-ink" />
    </svg>
  );
}
