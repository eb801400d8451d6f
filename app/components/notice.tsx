import type { ReactNode } from 'react';
import { classNames } from '#app/lib/class-names.ts';
import { errorText, ProblemError } from '#app/lib/api-client.ts';

/** A note with a bar at its side. `problem` speaks up at once; `info` waits for its turn. */
export function Notice(props: {
  kind?: 'info' | 'problem';
  title?: ReactNode;
  children?: ReactNode;
  className?: string;
}) {
  const problem = props.kind === 'problem';
  return (
    <div
      role={problem ? 'alert' : 'status'}
      className={classNames(
        'border-y border-l-[6px] border-y-rule py-[7px] pl-3.5 text-[13.5px]',
        problem ? 'border-l-danger' : 'border-l-ink',
        props.className,
      )}
    >
      {props.title !== undefined && (
        <b className={classNames('font-bold', problem && 'text-danger')}>{props.title} </b>
      )}
      {props.children}
    </div>
  );
}

/** Whatever was thrown, as a notice: what was found, what was expected, how to mend it, where the server said so. */
export function ProblemNotice(props: {
  error: unknown;
  title?: string;
  children?: ReactNode;
  className?: string;
}) {
  const problem = props.error instanceof ProblemError ? props.error.problem : undefined;
  const parts = [
    ['Found', problem?.found],
    ['Expected', problem?.expected],
    ['To mend it', problem?.remedy],
  ].filter((part): part is [string, string] => part[1] !== undefined);
  const title = props.title ?? (problem && parts.length > 0 ? problem.title : undefined);
  return (
    <Notice kind="problem" title={title} className={props.className}>
      {parts.length > 0 ? (
        <dl className="mt-1 grid grid-cols-[auto_1fr] gap-x-4 gap-y-0.5">
          {parts.map(([name, words]) => (
            <div key={name} className="contents">
              <dt className="text-ink-2">{name}</dt>
              <dd>{words}</dd>
            </div>
          ))}
        </dl>
      ) : (
        errorText(props.error)
      )}
      {props.children !== undefined && <div className="mt-2 flex flex-wrap gap-x-4">{props.children}</div>}
    </Notice>
  );
}
