import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { useState, useSyncExternalStore, type FormEvent } from 'react';
import { Navigate, useParams } from 'react-router-dom';
import { Button } from '#app/components/button.tsx';
import { FileDrop } from '#app/components/file-drop.tsx';
import { TextField } from '#app/components/inputs.tsx';
import { LeaveGuard } from '#app/components/leave-guard.tsx';
import { MessagePage, NotFound } from '#app/components/message-page.tsx';
import { ProblemNotice } from '#app/components/notice.tsx';
import { guessPart } from '#app/features/layers/guess-part.ts';
import { createSendingStore } from '#app/features/layers/uploads/sending-store.ts';
import { sendUpload } from '#app/features/layers/uploads/send-upload.ts';
import { SendingRow } from '#app/features/layers/uploads/upload-panel.tsx';
import { isReady, missingWords } from '#app/features/layers/uploads/plan-words.ts';
import { UploadRow } from '#app/features/layers/uploads/upload-row.tsx';
import { dismiss, uploadsQuery } from '#app/features/layers/uploads/uploads-query.ts';
import { WorkingGridChoice } from '#app/features/layers/uploads/working-grid-choice.tsx';
import { useDropAnywhere } from '#app/features/layers/use-drop-anywhere.ts';
import { roleIn, sessionQuery } from '#app/features/session/session.ts';
import { makeSiteMutation } from '#app/features/sites/create-site.ts';
import { ProblemError } from '#app/lib/api-client.ts';
import { PageTop, PaperPage } from '../shell/paper-page.tsx';

/** Makes a site of one raster. */
export function Page() {
  const teamId = useParams().teamId ?? '';
  const session = useQuery(sessionQuery).data;
  const role = roleIn(session, teamId);
  const team = session?.memberships.find((membership) => membership.teamId === teamId);
  if (role === undefined || team === undefined) return <NotFound top={<PageTop />} what="team" />;
  if (role !== 'modeller' && role !== 'admin')
    return (
      <MessagePage top={<PageTop />} title="Sites are made by modellers and admins">
        In {team.teamName} you are a {role}. Ask a modeller or an admin of the team to make the site; you will
        see it in your list.
      </MessagePage>
    );
  return <NewSite teamId={teamId} teamName={team.teamName} me={session?.person?.name ?? ''} />;
}

function NewSite({ teamId, teamName, me }: { teamId: string; teamName: string; me: string }) {
  const [name, setName] = useState('');
  const [tried, setTried] = useState(false);
  const queryClient = useQueryClient();
  const [store] = useState(() =>
    createSendingStore((file) => sendUpload(queryClient, teamId, { siteId: undefined, ...file })),
  );
  const sendings = useSyncExternalStore(store.subscribe, store.snapshot);
  const uploads = useQuery(uploadsQuery(teamId, undefined));
  // Others of the team may be at the same; the latest of one's own is the one that is worked on.
  const mine = uploads.data?.filter(({ uploadedBy }) => uploadedBy === me) ?? [];
  const upload = mine.at(-1);
  const make = useMutation(makeSiteMutation(queryClient, teamId));
  const sending = sendings.some(({ state }) => state.kind !== 'refused');
  const choose = (file: File) => {
    for (const { key } of sendings) store.remove(key);
    for (const old of mine) dismiss(queryClient, old).catch(() => undefined);
    make.reset();
    store.drop([file], ({ name: fileName }) => guessPart(fileName, []));
  };
  useDropAnywhere(make.isPending ? undefined : (files) => choose(files[0]));
  const ready = upload !== undefined && isReady(upload) && !sending;

  const missing =
    upload && !ready && !sending && upload.state === 'choices'
      ? [...missingWords(upload), ...(name.trim() === '' ? ['the name of the site'] : [])]
      : [];

  const submit = (event: FormEvent) => {
    event.preventDefault();
    setTried(true);
    if (!ready || name.trim() === '' || make.isPending) return;
    make.mutate({ uploadId: upload.id, name: name.trim() });
  };
  // By rendering, so that the guard against leaving is gone first.
  if (make.data) return <Navigate to={`/sites/${make.data.id}/ground`} replace />;
  const nameRefusal = make.error instanceof ProblemError ? make.error.fields.name : undefined;

  return (
    <PaperPage
      title="New site"
      lead={`A place that ${teamName} works on. Its first raster sets the working grid: CRS, cell size and extent.`}
      aside={<Notes />}
    >
      <form onSubmit={submit} noValidate className="grid max-w-[640px] gap-6 border-t border-ink pt-4">
        <TextField
          label="Name of the site"
          value={name}
          maxLength={100}
          autoComplete="off"
          disabled={make.isPending}
          error={nameRefusal ?? (tried && name.trim() === '' ? 'Give the site a name' : undefined)}
          onChange={(event) => setName(event.target.value)}
        />
        <FileDrop
          label="Drop a GeoTIFF here"
          hint="Any CRS: one in degrees, in feet or with several bands is read, and you see what would be made of it."
          accept=".tif,.tiff,image/tiff"
          fileName={sendings.at(0)?.file.name ?? upload?.fileName}
          disabled={make.isPending}
          error={tried && !sending && upload === undefined ? 'Choose a raster of the site' : undefined}
          onFile={choose}
        />
        {sendings.map((each) => (
          <SendingRow key={each.key} sending={each} onRemove={() => store.remove(each.key)} />
        ))}
        {uploads.error && <ProblemNotice error={uploads.error} title="The file cannot be followed." />}
        {upload && !sending && (
          <div className="grid gap-3 text-[13.5px]">
            <UploadRow upload={upload} grid={undefined} />
            {upload.state === 'choices' && <WorkingGridChoice upload={upload} />}
          </div>
        )}
        {make.error && nameRefusal === undefined && <ProblemNotice error={make.error} />}
        <div className="flex flex-wrap items-center gap-4">
          <Button
            kind="primary"
            type="submit"
            busy={make.isPending}
            busyLabel="Making the site"
            disabled={sending || (upload !== undefined && !ready)}
          >
            Make the site
          </Button>
          {missing.length > 0 && <p className="text-note text-ink-2">Still missing: {missing.join(', ')}.</p>}
        </div>
      </form>
      <LeaveGuard
        when={sending}
        what="The file"
        description="The upload stops when you leave this page, and leaves nothing behind."
      />
    </PaperPage>
  );
}

function Notes() {
  return (
    <>
      <h2 className="mb-1 text-body text-ink">What a run needs</h2>
      <p>
        <b className="text-ink">habitat</b>, classes of ground: where the plant can grow, and how well.
      </p>
      <p className="mt-2">
        <b className="text-ink">cover</b>, the share of each cell that stands now.
      </p>
      <p className="mt-2">
        <b className="text-ink">elevation, exposure, refuge, allowed</b> are optional; all layers are added
        afterwards, brought onto the same cells.
      </p>
      <p className="mt-4">
        A raster in degrees or feet is brought to the UTM zone that fits. A file that cannot be used is
        refused with what would mend it.
      </p>
    </>
  );
}
