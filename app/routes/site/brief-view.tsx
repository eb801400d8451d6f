import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { useNavigate } from 'react-router-dom';
import type { Brief } from '#contract/briefs.ts';
import { ConfirmDialog } from '#app/components/confirm-dialog.tsx';
import { Notice, ProblemNotice } from '#app/components/notice.tsx';
import { SaveBar } from '#app/components/save-bar.tsx';
import { Button } from '#app/components/button.tsx';
import { sayDone } from '#app/components/toast.tsx';
import { WordAnchor, WordButton, WordLink } from '#app/components/word-button.tsx';
import { draftProblem } from '#app/features/briefs/brief-draft.ts';
import { briefQuery, keepBrief, mapUrl, pdfUrl } from '#app/features/briefs/briefs-query.ts';
import { duplicateBrief, removeBrief, saveVersion } from '#app/features/briefs/change-brief.ts';
import { SendDialog } from '#app/features/briefs/send/send-dialog.tsx';
import { SentList } from '#app/features/briefs/send/sent-list.tsx';
import { AnnexView } from '#app/features/briefs/sheet/annex-view.tsx';
import { BriefSheet } from '#app/features/briefs/sheet/brief-sheet.tsx';
import { useBriefDraft } from '#app/features/briefs/use-brief-draft.ts';
import { VersionList } from '#app/features/briefs/version-list.tsx';
import { RecoveryCurves } from '#app/features/comparisons/recovery-curves.tsx';
import { membersQuery } from '#app/features/team/members.ts';
import { ProblemError } from '#app/lib/api-client.ts';
import { formatCounted } from '#app/lib/formats.ts';
import { siteKey } from '#app/lib/site-cache.ts';
import { SitePage } from './site-page.tsx';
import { useSite } from './use-site.ts';

/** A version of a brief on its sheet; the newest one is written in place by whoever may. */
export function BriefView({ brief }: { brief: Brief }) {
  const { site, mayDraw } = useSite();
  const newest = brief.version === brief.latest;
  const { draft, unsaved, change, put, forget } = useBriefDraft(brief);
  const queryClient = useQueryClient();
  const navigate = useNavigate();
  const address = `/sites/${site.id}/briefs/${brief.id}`;
  const [sending, setSending] = useState(false);
  const members = useQuery({ ...membersQuery(site.teamId), enabled: sending }).data ?? [];
  const save = useMutation({
    mutationFn: ({ base, figures }: { base: number; figures: 'kept' | 'anew' }) =>
      saveVersion(brief, { base, text: draft.text, figures }),
    onSuccess: (saved) => {
      forget();
      keepBrief(queryClient, saved);
      sayDone(`Version ${saved.version} saved`);
    },
  });
  const writable = mayDraw && newest;
  const text = writable ? draft.text : brief.text;
  const problem = unsaved && writable ? draftProblem(draft.text) : undefined;
  const saveOn = (base: number, figures: 'kept' | 'anew' = 'kept') => save.mutate({ base, figures });
  const conflict = save.error instanceof ProblemError && save.error.code === 'conflict';
  const line = brief.versions.find(({ version }) => version === brief.version);
  return (
    <SitePage
      step="brief"
      title={brief.text.title}
      sheet={
        <>
          <div className="mx-auto flex max-w-[820px] flex-wrap items-baseline justify-between gap-x-6 pb-2">
            <WordLink to={`/sites/${site.id}/brief`} plain>
              All briefs
            </WordLink>
            {!newest && (
              <Notice className="w-full" title={`Version ${brief.version} of ${brief.latest}.`}>
                It never changes.{' '}
                <span className="inline-flex flex-wrap gap-x-4">
                  <WordLink to={address}>Go to the newest</WordLink>
                  {mayDraw && (
                    <WordButton
                      lined
                      onClick={() => {
                        put({ base: brief.latest, text: brief.text });
                        void navigate(address);
                      }}
                    >
                      Take its words into a new version
                    </WordButton>
                  )}
                </span>
              </Notice>
            )}
            {writable && brief.comparisonMoved && (
              <Notice className="w-full" title="The comparison has moved on.">
                It has more futures, or another decision, than this version rests on.{' '}
                <WordButton lined busy={save.isPending} onClick={() => saveOn(draft.base, 'anew')}>
                  Save a version with its figures of now
                </WordButton>
              </Notice>
            )}
            {newest && line && line.briefPages > 1 && (
              <Notice className="w-full" title={`The page takes ${line.briefPages} pages.`}>
                Even the smallest type does not bring this version onto one page. Shorten its words, or leave
                parts out.
              </Notice>
            )}
            {conflict ? (
              <Notice kind="problem" className="w-full" title="Somebody saved this brief meanwhile.">
                Your words are kept in this browser.{' '}
                <Conflict
                  brief={brief}
                  onKeep={(base) => saveOn(base)}
                  onTake={forget}
                  busy={save.isPending}
                />
              </Notice>
            ) : save.error ? (
              <ProblemNotice
                className="w-full"
                error={save.error}
                title="Not saved. Your words are kept here."
              />
            ) : null}
          </div>
          <BriefSheet
            text={text}
            facts={brief.facts}
            version={brief.version}
            mapAddress={(option) => mapUrl(brief, option)}
            onChange={writable ? change : undefined}
          />
          <AnnexView
            blocks={brief.facts.annex}
            curves={(outlook) => (
              <RecoveryCurves
                curves={brief.facts.outlooks[outlook].options.map(({ curve }, i) => ({
                  name: brief.facts.options[i].name,
                  wait: brief.facts.options[i].wait,
                  curve,
                }))}
                surveyYear={brief.facts.surveyYear}
                years={brief.facts.years}
                chosen={brief.facts.decision ? brief.facts.lead : undefined}
              />
            )}
          />
        </>
      }
      margin={
        <>
          <h2 className="text-lead font-bold">
            Version {brief.version}
            {unsaved && writable ? ', and words not saved yet' : ''}
          </h2>
          <p className="text-note text-ink-2">
            Of the comparison “{brief.facts.comparison.name}”, from{' '}
            {formatCounted(brief.facts.comparison.done, 'future')} of each option.
          </p>
          <div className="my-2 flex flex-wrap gap-x-5">
            <WordAnchor href={pdfUrl(brief)} download>
              PDF of version {brief.version}
            </WordAnchor>
            {brief.comparisonId && (
              <WordLink to={`/sites/${site.id}/compare/${brief.comparisonId}`}>Comparison</WordLink>
            )}
          </div>
          {writable && (
            <p className="mb-2 text-note text-ink-2">
              Click on words to write, or press “write” beside a heading. Figures, maps and tables come from
              the comparison.
            </p>
          )}
          {mayDraw && <SentList brief={brief} />}
          <VersionList brief={brief} />
          {mayDraw && <Deeds brief={brief} />}
          {sending && <SendDialog brief={brief} members={members} onClose={() => setSending(false)} />}
        </>
      }
      action={
        !writable ? undefined : unsaved ? (
          <SaveBar
            label={`Save as version ${brief.latest + 1}`}
            dirty
            busy={save.isPending}
            words={problem ?? 'Kept in this browser until saved.'}
            onSave={() => {
              if (problem === undefined) saveOn(draft.base);
            }}
            onRevert={forget}
          />
        ) : (
          <Button kind="primary" onClick={() => setSending(true)}>
            Send version {brief.version}
          </Button>
        )
      }
    />
  );
}

/** Ways on when another version came first; none loses anything. */
function Conflict(props: {
  brief: Brief;
  busy: boolean;
  onKeep: (base: number) => void;
  onTake: () => void;
}) {
  const { brief } = props;
  const queryClient = useQueryClient();
  const theirs = useQuery({ ...briefQuery(brief.siteId, brief.id), staleTime: 0 }).data ?? brief;
  const newest = theirs.versions[0];
  return (
    <span className="flex flex-wrap items-baseline gap-x-4">
      <span>
        Version {newest.version} is by {newest.by}.
      </span>
      <WordButton lined busy={props.busy} onClick={() => props.onKeep(theirs.latest)}>
        Save mine as version {theirs.latest + 1}; theirs stays
      </WordButton>
      <WordButton
        lined
        onClick={() => {
          props.onTake();
          void queryClient.invalidateQueries({ queryKey: briefQuery(brief.siteId, brief.id).queryKey });
        }}
      >
        Take theirs
      </WordButton>
    </span>
  );
}

function Deeds({ brief }: { brief: Brief }) {
  const queryClient = useQueryClient();
  const navigate = useNavigate();
  const [asking, setAsking] = useState(false);
  const list = `/sites/${brief.siteId}/brief`;
  const copy = useMutation({
    mutationFn: () => duplicateBrief(brief),
    onSuccess: (made) => {
      keepBrief(queryClient, made);
      void navigate(`/sites/${made.siteId}/briefs/${made.id}`);
    },
  });
  const remove = useMutation({
    mutationFn: () => removeBrief(brief),
    onSuccess: () => {
      void queryClient.invalidateQueries({ queryKey: [...siteKey(brief.siteId), 'briefs'] });
      void navigate(list);
    },
  });
  return (
    <section aria-label="This brief" className="flex flex-wrap gap-x-5 border-t border-rule py-2">
      <WordButton lined busy={copy.isPending} onClick={() => copy.mutate()}>
        Copy it
      </WordButton>
      <WordButton lined onClick={() => setAsking(true)}>
        Delete it
      </WordButton>
      {copy.error ? <ProblemNotice error={copy.error} title="Not copied." /> : null}
      <ConfirmDialog
        open={asking}
        onOpenChange={setAsking}
        title="Delete this brief?"
        description={`All its ${formatCounted(brief.versions.length, 'version')} go. The comparison stays. A brief that was sent cannot be deleted.`}
        action="Delete the brief"
        keep="Keep it"
        busy={remove.isPending}
        error={remove.error}
        onConfirm={() => remove.mutate()}
      />
    </section>
  );
}
