import type { Upload } from '#contract/uploads.ts';

/** What was found, what was expected, and how to mend it. */
export function Reasons({ upload: { problem } }: { upload: Pick<Upload, 'problem'> }) {
  if (!problem) return null;
  const parts = [
    ['Found', problem.found],
    ['Expected', problem.expected],
    ['To mend it', problem.remedy],
  ].filter((part): part is [string, string] => part[1] !== undefined);
  if (parts.length === 0) return <>{problem.detail}</>;
  return (
    <dl className="mt-1 grid grid-cols-[auto_1fr] gap-x-4 gap-y-0.5">
      {parts.map(([name, words]) => (
        <div key={name} className="contents">
          <dt className="text-ink-2">{name}</dt>
          <dd className="wrap-anywhere">{words}</dd>
        </div>
      ))}
    </dl>
  );
}
