import { openAsBlob } from 'node:fs';
import type { AddressInfo } from 'node:net';
import type { Site } from '#contract/sites.ts';
import type { Upload } from '#contract/uploads.ts';
import { makeTeam, testPassword } from './people.ts';
import { testServer } from './test-server.ts';

/**
 * A process of its own, so that its peak memory can be read: starts the real app, uploads the GeoTIFF named on the command
 * line to it over HTTP, and makes a site of it as cover; cells of the size that is named after it, m, have it aligned
 * instead of taken as it is. Prints what became of it, how long each stage took and how long the slowest answer meanwhile,
 * in s, and the peak resident set before and after, in MB.
 */
const [path, cellSize] = process.argv.slice(2);
const peakMegabytes = () => Math.round(process.resourceUsage().maxRSS / 1024);

const server = await testServer();
const team = await makeTeam(server);
const listening = server.app.listen(0);
await new Promise((resolve) => listening.once('listening', resolve));
const address = `http://localhost:${(listening.address() as AddressInfo).port}`;
const call = async <T>(route: string, init: RequestInit = {}): Promise<T> => {
  const reply = await fetch(`${address}${route}`, init);
  if (!reply.ok) throw new Error(`${route}: ${reply.status} ${await reply.text()}`);
  return (await reply.json()) as T;
};
const json = (method: string, body: unknown): RequestInit => ({
  method,
  headers: { ...signedIn, 'content-type': 'application/json' },
  body: JSON.stringify(body),
});
let signedIn: Record<string, string> = {};
const session = await fetch(
  `${address}/api/session`,
  json('POST', { email: team.people.modeller.email, password: testPassword }),
);
signedIn = { cookie: (session.headers.get('set-cookie') ?? '').split(';')[0] };

let slowest = 0;
let progressSeen = 0;
/** Asks until the work behind the requests has come to `state`, as a page does. */
async function until(id: string, state: Upload['state']): Promise<Upload> {
  for (;;) {
    const asked = performance.now();
    const upload = await call<Upload>(`${uploads}/${id}`, { headers: signedIn });
    slowest = Math.max(slowest, (performance.now() - asked) / 1000);
    if (upload.state === state) return upload;
    if (upload.problem) throw new Error(upload.problem.detail);
    if (upload.progress && upload.progress.share > 0 && upload.progress.share < 1) progressSeen++;
    await new Promise((resolve) => setTimeout(resolve, 100));
  }
}

const uploads = `/api/teams/${team.teamId}/uploads`;
const form = new FormData();
form.set('part', 'cover');
form.set('file', await openAsBlob(path), 'large.tif');
const before = peakMegabytes();
const times: Record<string, number> = {};
let began = performance.now();
const timed = (stage: string) => {
  times[stage] = Math.round((performance.now() - began) / 100) / 10;
  began = performance.now();
};
const sent = await call<Upload>(uploads, { method: 'POST', headers: signedIn, body: form });
timed('sent');
const read = await until(sent.id, 'choices');
timed('read');
if (cellSize)
  await call(
    `${uploads}/${sent.id}/choices`,
    json('PUT', {
      ...read.choices,
      grid: { epsg: read.suggestedGrid!.grid.epsg, cellSize: Number(cellSize) },
    }),
  );
const { id } = await call<Site>(`${uploads}/${sent.id}/site`, json('POST', { name: 'Large marsh' }));
await until(sent.id, 'done');
timed('aligned');
const { grid, layers } = await call<Site>(`/api/sites/${id}`, { headers: signedIn });
const { method } = layers[0].alignment;
process.stdout.write(
  `${JSON.stringify({ grid, method, times, slowest, progressSeen, before, after: peakMegabytes() })}\n`,
);
listening.closeAllConnections();
listening.close();
await server.close();
