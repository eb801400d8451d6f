import { openAsBlob } from 'node:fs';
import type { AddressInfo } from 'node:net';
import { makeTeam, testPassword } from './people.ts';
import { testServer } from './test-server.ts';

/**
 * A process of its own, so that its peak memory can be read: starts the real app, uploads the GeoTIFF named on the command
 * line to it over HTTP as a site's cover, and prints what came back and the peak resident set before and after, in MB.
 */
const peakMegabytes = () => Math.round(process.resourceUsage().maxRSS / 1024);

const server = await testServer();
const team = await makeTeam(server);
const listening = server.app.listen(0);
await new Promise((resolve) => listening.once('listening', resolve));
const address = `http://localhost:${(listening.address() as AddressInfo).port}`;
const signedIn = await fetch(`${address}/api/session`, {
  method: 'POST',
  headers: { 'content-type': 'application/json' },
  body: JSON.stringify({ email: team.people.modeller.email, password: testPassword }),
});
const form = new FormData();
form.set('name', 'Large marsh');
form.set('part', 'cover');
form.set('file', await openAsBlob(process.argv[2]), 'large.tif');
const before = peakMegabytes();
const started = performance.now();
const reply = await fetch(`${address}/api/teams/${team.teamId}/sites`, {
  method: 'POST',
  headers: { cookie: (signedIn.headers.get('set-cookie') ?? '').split(';')[0] },
  body: form,
});
const body: unknown = await reply.json();
const seconds = (performance.now() - started) / 1000;
process.stdout.write(
  `${JSON.stringify({ status: reply.status, seconds, before, after: peakMegabytes(), body })}\n`,
);
listening.closeAllConnections();
listening.close();
await server.close();
