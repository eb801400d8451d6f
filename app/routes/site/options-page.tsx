import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { useSearchParams } from 'react-router-dom';
import { useSearchPatch } from '#app/lib/use-search-patch.ts';
import { LoadingLines } from '#app/components/loading-lines.tsx';
import { ProblemNotice } from '#app/components/notice.tsx';
import { WordButton } from '#app/components/word-button.tsx';
import { useGroundRasters } from '#app/features/layers/use-ground-rasters.ts';
import { loadLargeDrafts } from '#app/features/options/draft-storage.ts';
import { optionsQuery } from '#app/features/options/list-options.ts';
import { startingPens } from '#app/features/options/board/board-pens.ts';
import { OptionBoard } from './option-board.tsx';
import { SitePage } from './site-page.tsx';
import { useSite } from './use-site.ts';

/** The map as drawing board: what could be done on the ground, where and when. */
export function Page() {
  const { site } = useSite();
  const options = useQuery(optionsQuery(site.id));
  const ground = useGroundRasters(site);
  const [search] = useSearchParams();
  const patchSearch = useSearchPatch();
  const [pens, setPens] = useState(() => startingPens(site.outlook.surveyYear));
  const [made, setMade] = useState<string>();

  // Before the first drawing is asked for, so that none comes up as the server has it.
  const drafts = useQuery({ queryKey: ['large-drafts'], queryFn: loadLargeDrafts, staleTime: Infinity });
  if (options.data === undefined || drafts.data === undefined)
    return (
      <SitePage step="options" map={<div className="size-full" />} margin={<Waiting options={options} />} />
    );
  const asked = search.get('option');
  const [wait, ...others] = options.data;
  const option =
    options.data.find(({ id }) => id === asked) ?? others.find(({ archived }) => !archived) ?? wait;
  return (
    <OptionBoard
      key={option.id}
      {...{ option, ground, pens }}
      options={options.data}
      justMade={option.id === made}
      onPens={setPens}
      onChoose={(id, isNew = false) => {
        setMade(isNew ? id : undefined);
        patchSearch({ option: id });
      }}
    />
  );
}

function Waiting({ options }: { options: { error: unknown; refetch: () => unknown } }) {
  if (!options.error) return <LoadingLines label="Fetching the options" lines={4} />;
  return (
    <ProblemNotice error={options.error} title="The options could not be fetched.">
      <WordButton lined onClick={() => void options.refetch()}>
        Try again
      </WordButton>
    </ProblemNotice>
  );
}
