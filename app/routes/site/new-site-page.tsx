import { useQuery, useQueryClient } from '@tanstack/react-query';
import { useRef, useState, type FormEvent } from 'react';
import { Navigate, useParams } from 'react-router-dom';
import { layerParts, type LayerPart } from '#contract/layers.ts';
import { Button } from '#app/components/button.tsx';
import { FileDrop } from '#app/components/file-drop.tsx';
import { TextField } from '#app/components/inputs.tsx';
import { LeaveGuard } from '#app/components/leave-guard.tsx';
import { MessagePage, NotFound } from '#app/components/message-page.tsx';
import { ProblemNotice } from '#app/components/notice.tsx';
import { Progress } from '#app/components/progress.tsx';
import { WordButton } from '#app/components/word-button.tsx';
import { WordChoice } from '#app/components/word-choice.tsx';
import { guessPart } from '#app/features/layers/guess-part.ts';
import { partHolds, partLabels } from '#app/features/layers/part-words.ts';
import { useDropAnywhere } from '#app/features/layers/use-drop-anywhere.ts';
import { roleIn, sessionQuery } from '#app/features/session/session.ts';
import { sendSite } from '#app/features/sites/create-site.ts';
import { ProblemError, type Progress as Sent } from '#app/lib/api-client.ts';
import { formatBytes } from '#app/lib/formats.ts';
import { PageTop, PaperPage } from '../shell/paper-page.tsx';

/** Makes a site of one GeoTIFF. */
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
  return <NewSite teamId={teamId} teamName={team.teamName} />;
}

type Sending =
  | { kind: 'idle' }
  | { kind: 'sending'; sent: Sent }
  | { kind: 'refused'; error: unknown }
  | { kind: 'made'; siteId: string };

function NewSite({ teamId, teamName }: { teamId: string; teamName: string }) {
  const [name, setName] = useState('');
  const [file, setFile] = useState<File>();
  const [part, setPart] = useState<LayerPart>('habitat');
  const [tried, setTried] = useState(false);
  const [sending, setSending] = useState<Sending>({ kind: 'idle' });
  const abort = useRef<AbortController>(undefined);
  const queryClient = useQueryClient();
  const busy = sending.kind === 'sending';
  const choose = (chosen: File) => {
    setFile(chosen);
    setPart(guessPart(chosen.name, []) ?? part);
    setSending({ kind: 'idle' });
  };
  useDropAnywhere(busy ? undefined : (files) => choose(files[0]));

  const submit = async (event: FormEvent) => {
    event.preventDefault();
    setTried(true);
    if (busy || name.trim() === '' || file === undefined) return;
    const controller = new AbortController();
    abort.current = controller;
    setSending({ kind: 'sending', sent: { sent: 0, total: file.size } });
    try {
      const site = await sendSite(queryClient, teamId, {
        name,
        part,
        file,
        onProgress: (sent) => setSending({ kind: 'sending', sent }),
        signal: controller.signal,
      });
      setSending({ kind: 'made', siteId: site.id });
    } catch (error) {
      setSending(controller.signal.aborted ? { kind: 'idle' } : { kind: 'refused', error });
    }
  };
  // By rendering, so that the guard against leaving is gone first.
  if (sending.kind === 'made') return <Navigate to={`/sites/${sending.siteId}/ground`} replace />;
  const refusal = sending.kind === 'refused' ? sending.error : undefined;
  const nameRefusal = refusal instanceof ProblemError ? refusal.fields.name : undefined;

  return (
    <PaperPage
      title="New site"
      lead={`A place that ${teamName} works on. Its first raster sets the working grid: CRS, cell size and extent.`}
      aside={<Notes />}
    >
      <form
        onSubmit={(event) => void submit(event)}
        noValidate
        className="grid max-w-[640px] gap-6 border-t border-ink pt-4"
      >
        <TextField
          label="Name of the site"
          value={name}
          maxLength={100}
          autoComplete="off"
          disabled={busy}
          error={nameRefusal ?? (tried && name.trim() === '' ? 'Give the site a name' : undefined)}
          onChange={(event) => setName(event.target.value)}
        />
        <FileDrop
          label="Drop a GeoTIFF here"
          hint="One band, square cells, in a projected CRS in metres."
          accept=".tif,.tiff,image/tiff"
          fileName={file && `${file.name}, ${formatBytes(file.size)}`}
          disabled={busy}
          error={tried && file === undefined ? 'Choose a raster of the site' : undefined}
          onFile={choose}
        />
        <div>
          <WordChoice
            label="It holds"
            showLabel
            options={layerParts.map((key) => ({ key, label: partLabels[key].toLowerCase(), disabled: busy }))}
            value={part}
            onChange={setPart}
          />
          <p className="mt-0.5 text-note text-ink-2">
            {partHolds[part]}; the other layers are added afterwards, on the same cells.
          </p>
        </div>
        {refusal !== undefined && nameRefusal === undefined && (
          <ProblemNotice error={refusal} title={`${file?.name ?? 'The file'} was refused.`} />
        )}
        {sending.kind === 'sending' && <Sends sent={sending.sent} file={file} />}
        <div className="flex flex-wrap items-center gap-4">
          <Button kind="primary" type="submit" busy={busy} busyLabel="Making the site">
            Make the site
          </Button>
          {busy && (
            <WordButton lined onClick={() => abort.current?.abort()}>
              Cancel the upload
            </WordButton>
          )}
        </div>
      </form>
      <LeaveGuard
        when={busy}
        what="The site"
        description="The upload stops when you leave this page, and leaves nothing behind."
      />
    </PaperPage>
  );
}

function Sends({ sent, file }: { sent: Sent; file: File | undefined }) {
  const total = sent.total ?? file?.size ?? 0;
  const checking = sent.sent >= total;
  return (
    <Progress
      label={checking ? 'Reading and checking the raster' : `Sending ${file?.name ?? ''}`}
      done={sent.sent}
      of={total}
      note={
        checking ? undefined : `${formatBytes(sent.sent)} of ${formatBytes(total)}; cancelling leaves nothing`
      }
    />
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
        <b className="text-ink">refuge</b>, where survivors are sheltered. Optional.
      </p>
      <p className="mt-4">
        A file in degrees, with several bands or on oblong cells is refused with what would mend it. Nothing
        of a refused file is kept.
      </p>
    </>
  );
}
