import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { useEffect, useRef } from 'react';
import { Notice, ProblemNotice } from '#app/components/notice.tsx';
import { Progress } from '#app/components/progress.tsx';
import { WordButton } from '#app/components/word-button.tsx';
import { formatLength } from '#app/lib/formats.ts';
import { siteKey } from '#app/lib/site-cache.ts';
import { cancelGridChangeMutation, gridChangeQuery } from './cell-size-query.ts';

/** How far a change of the working grid is. The site takes the new cells all at once, when it is done. */
export function GridChangeProgress({ siteId, editable }: { siteId: string; editable: boolean }) {
  const queryClient = useQueryClient();
  const change = useQuery(gridChangeQuery(siteId)).data;
  const cancel = useMutation(cancelGridChangeMutation(queryClient, siteId));
  const wasOn = useRef(false);
  const on = change !== undefined && change !== null;
  useEffect(() => {
    if (wasOn.current && !on) void queryClient.invalidateQueries({ queryKey: siteKey(siteId) });
    wasOn.current = on;
  }, [on, siteId, queryClient]);
  if (!on) return null;
  const off = (words: string) =>
    editable && (
      <WordButton lined busy={cancel.isPending} onClick={() => cancel.mutate()}>
        {words}
      </WordButton>
    );
  const cells = `cells of ${formatLength(change.grid.cellSize)}`;
  return (
    <div className="mb-2">
      {change.state === 'failed' ? (
        <Notice kind="problem" title={`The change to ${cells} broke off; the site is as it was.`}>
          {change.problem}
          <div>{off('Dismiss')}</div>
        </Notice>
      ) : (
        <>
          <Progress
            label={`Bringing all layers onto ${cells}`}
            done={change.progress?.share ?? 0}
            of={1}
            secondsLeft={change.progress?.secondsLeft ?? undefined}
            note="until then the site is as it was"
          />
          {off('Cancel the change')}
        </>
      )}
      {cancel.error && <ProblemNotice error={cancel.error} className="mt-1" />}
    </div>
  );
}
