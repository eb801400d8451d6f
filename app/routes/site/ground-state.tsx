import { ProblemNotice } from '#app/components/notice.tsx';
import { WordButton, WordLink } from '#app/components/word-button.tsx';
import type { GroundRasters } from '#app/features/layers/use-ground-rasters.ts';
import { useSite } from './use-site.ts';

/** What the map still waits for, or what keeps it empty. */
export function GroundState({ ground }: { ground: GroundRasters }) {
  const { site } = useSite();
  const has = (part: 'habitat' | 'cover') => site.layers.some((layer) => layer.part === part);
  const { error } = ground;
  const box = 'absolute top-10 left-4 max-w-[420px] bg-ground px-3 py-1.5 text-note lg:left-6';
  if (error)
    return (
      <div className={box}>
        <ProblemNotice error={error} title="The ground could not be fetched.">
          <WordButton lined onClick={ground.retry}>
            Try again
          </WordButton>
        </ProblemNotice>
      </div>
    );
  if (!has('cover') || !has('habitat'))
    return (
      <p className={box}>
        {has('cover')
          ? 'There is no habitat layer, so nothing says where a mound can stand.'
          : 'There is no cover layer, so the map cannot show what stands today.'}{' '}
        <WordLink to={`/sites/${site.id}/ground`}>Add it on Ground</WordLink>
      </p>
    );
  if (!ground.cover)
    return (
      <p role="status" className={`${box} busy-ticks`}>
        Fetching the cover
      </p>
    );
  return null;
}
