import type { Brief } from '#contract/briefs.ts';
import { WordLink } from '#app/components/word-button.tsx';
import { formatBytes, formatCounted, formatDateTime } from '#app/lib/formats.ts';

/** The versions of a brief, newest first; none ever changes. */
export function VersionList({ brief }: { brief: Brief }) {
  return (
    <section aria-label="Versions" className="border-t border-rule py-2">
      <h2 className="text-body font-bold">Versions</h2>
      <ol>
        {brief.versions.map(({ version, title, at, by, pages, bytes }) => (
          <li key={version} className="border-t border-rule-2 py-1 first:border-t-0">
            {version === brief.version ? (
              <b>Version {version}</b>
            ) : (
              <WordLink
                to={`/sites/${brief.siteId}/briefs/${brief.id}${version === brief.latest ? '' : `?version=${version}`}`}
              >
                Version {version}
              </WordLink>
            )}
            <span className="block text-note break-words text-ink-2">
              {title}. {formatDateTime(at)}, {by}; {formatCounted(pages, 'page')}, {formatBytes(bytes)}
            </span>
          </li>
        ))}
      </ol>
    </section>
  );
}
