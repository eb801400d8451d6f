import { randomUUID } from 'node:crypto';
import { readdirSync, readFileSync, rmSync } from 'node:fs';
import type { AddressInfo } from 'node:net';
import { join } from 'node:path';
import { simpleParser, type ParsedMail } from 'mailparser';
import { SMTPServer } from 'smtp-server';
import { afterAll, afterEach, beforeAll, expect, it } from 'vitest';
import type { Brief, BriefMessage } from '#contract/briefs.ts';
import type { Problem } from '#contract/problem.ts';
import { binaryReply } from '#server/testing/binary-reply.ts';
import { makeTestBrief, startTestComparison } from '#server/testing/comparisons.ts';
import { makeTeam, signInAs, type Agent, type TestTeam } from '#server/testing/people.ts';
import { makeSite } from '#server/testing/sites.ts';
import { testServer, type TestServer } from '#server/testing/test-server.ts';

let server: TestServer;
let mailServer: SMTPServer | undefined;
/** signed in on `server` */
let manager: Agent;
let team: TestTeam;
let brief: Brief;
/** a data folder with the team and the brief, on copies of which each test has a server of its own */
let folder: string;
beforeAll(async () => {
  const first = await testServer();
  team = await makeTeam(first, 'Sending team');
  const site = await makeSite(team.agents.modeller, team.teamId);
  const comparison = await startTestComparison(team.agents.modeller, site);
  brief = await makeTestBrief(team.agents.manager, site, comparison);
  folder = await first.freeze();
}, 60_000);
afterAll(() => rmSync(folder, { recursive: true, force: true }));
afterEach(async () => {
  await server.close();
  if (mailServer) await new Promise<void>((done) => mailServer!.close(() => done()));
  mailServer = undefined;
});

/** A real mail server on loopback: it refuses mailboxes that begin with `nobody`, and keeps what it takes. */
async function listen(): Promise<{ smtpUrl: string; received: { to: string[]; mail: ParsedMail }[] }> {
  const received: { to: string[]; mail: ParsedMail }[] = [];
  mailServer = new SMTPServer({
    authOptional: true,
    disabledCommands: ['STARTTLS'],
    onRcptTo({ address }, _session, callback) {
      callback(
        address.startsWith('nobody')
          ? Object.assign(new Error('5.1.1 no such mailbox here'), { responseCode: 550 })
          : null,
      );
    },
    onData(stream, session, callback) {
      void simpleParser(stream).then((mail) => {
        received.push({ to: session.envelope.rcptTo.map(({ address }) => address), mail });
        callback();
      });
    },
  });
  await new Promise<void>((done) => mailServer!.listen(0, '127.0.0.1', done));
  const { port } = mailServer.server.address() as AddressInfo;
  return { smtpUrl: `smtp://127.0.0.1:${port}?ignoreTLS=true`, received };
}

async function begin(config: { smtpUrl?: string } = {}): Promise<void> {
  server = await testServer(config, folder);
  manager = await signInAs(server, team.people.manager);
}
const pathOf = (rest = '/messages') => `/api/sites/${brief.siteId}/briefs/${brief.id}${rest}`;
const draft = (changes: object = {}) => ({
  key: randomUUID(),
  version: 1,
  to: ['board@people.example'],
  subject: 'Brief on the mounds — für den Vorstand',
  text: 'Dear board,\nhere is the brief.',
  attach: true,
  ...changes,
});
const send = (body: object, status = 200) => manager.post(pathOf()).send(body).expect(status);
async function settled(): Promise<BriefMessage[]> {
  await server.services.mail.idle();
  const { body } = await manager.get(pathOf()).expect(200);
  return (body as { messages: BriefMessage[] }).messages;
}

it('goes to each person alone, as plain text with the very PDF of the version, and answers go to the sender', async () => {
  const { smtpUrl, received } = await listen();
  await begin({ smtpUrl });
  await send(draft({ to: ['board@people.example', 'permits@people.example'] }));
  const [message] = await settled();
  expect(message).toMatchObject({ version: 1, attached: true, sentBy: 'Sending team: manager' });
  expect(message.recipients).toEqual([
    { address: 'board@people.example', status: 'sent', error: null },
    { address: 'permits@people.example', status: 'sent', error: null },
  ]);
  expect(received.map(({ to }) => to)).toEqual([['board@people.example'], ['permits@people.example']]);
  const pdf = (await binaryReply(manager.get(pathOf('/versions/1/brief.pdf'))).expect(200)).body as Buffer;
  for (const { mail } of received) {
    expect(mail.subject).toBe('Brief on the mounds — für den Vorstand');
    expect(mail.html).toBe(false);
    expect(mail.text).toMatch(/^Dear board,\nhere is the brief\./);
    expect(mail.text).toContain(`/sites/${brief.siteId}/briefs/${brief.id}?version=1`);
    expect(mail.text).toContain('it is no permit, survey or engineering design');
    expect(mail.replyTo?.value[0].address).toBe(team.people.manager.email);
    expect(mail.attachments).toHaveLength(1);
    expect(mail.attachments[0]).toMatchObject({
      contentType: 'application/pdf',
      contentDisposition: 'attachment',
    });
    expect(mail.attachments[0].filename).toMatch(/brief.*\.pdf$/);
    expect(mail.attachments[0].content.equals(pdf)).toBe(true);
  }
});

it('is sent once by a key, however often and whoever asks at once', async () => {
  const { smtpUrl, received } = await listen();
  await begin({ smtpUrl });
  const body = draft();
  const replies = await Promise.all([send(body), send(body), send(body)]);
  await settled();
  await send({ ...body, subject: 'Another subject' });
  expect(new Set(replies.map((reply) => (reply.body as BriefMessage).id)).size).toBe(1);
  expect(await settled()).toHaveLength(1);
  expect(received).toHaveLength(1);
  await send(draft());
  await settled();
  expect(received).toHaveLength(2);
});

it('says what the mail server said of whom it refused, and reaches the others', async () => {
  const { smtpUrl, received } = await listen();
  await begin({ smtpUrl });
  await send(draft({ to: ['nobody@people.example', 'board@people.example'], attach: false }));
  const [{ recipients }] = await settled();
  expect(recipients[0]).toMatchObject({
    status: 'failed',
    error: expect.stringContaining('no such mailbox here'),
  });
  expect(recipients[1]).toMatchObject({ status: 'sent', error: null });
  expect(received).toHaveLength(1);
  expect(received[0].mail.attachments).toEqual([]);
  const admin = await signInAs(server, team.people.admin);
  const outbox = await admin.get(`/api/teams/${team.teamId}/outbox`).expect(200);
  expect(
    (outbox.body as { messages: { status: string }[] }).messages.map(({ status }) => status).sort(),
  ).toEqual(['failed', 'sent']);
});

it('stays in the local outbox where no mail server is set, PDF and all, and then the brief is kept', async () => {
  await begin();
  await send(draft());
  const [{ recipients }] = await settled();
  expect(recipients).toEqual([{ address: 'board@people.example', status: 'outbox', error: null }]);
  const letters = join(server.services.config.dataDir, 'outbox');
  const mail = await simpleParser(readFileSync(join(letters, readdirSync(letters)[0])));
  expect(mail.attachments[0].contentType).toBe('application/pdf');
  await manager.delete(pathOf('')).expect(409);
});

it('refuses what is no address, no line, nobody, the same person twice, or too many', async () => {
  await begin();
  const many = (count: number, tag = '') =>
    Array.from({ length: count }, (_, i) => `p${tag}${i}@people.example`);
  for (const [changes, field] of [
    [{ to: ['board'] }, 'to.0'],
    [{ to: ['board@people.example\r\nBcc: all@people.example'] }, 'to.0'],
    [{ subject: 'Brief\r\nBcc: all@people.example' }, 'subject'],
    [{ to: [] }, 'to'],
    [{ to: ['a@people.example', 'A@people.example'] }, 'to'],
    [{ to: many(21) }, 'to'],
    [{ text: ' ' }, 'text'],
  ] as const) {
    const refused = await send(draft(changes), 400);
    expect((refused.body as Problem).fields?.map((each) => each.field)).toContain(field);
  }
  await send(draft({ version: 7 }), 404);
  expect(await settled()).toEqual([]);
  for (let round = 0; round < 10; round++) await send(draft({ to: many(20, `${round}-`), attach: false }));
  const refused = await send(draft(), 429);
  expect((refused.body as Problem).detail).toMatch(/200 a day/);
  await settled();
  server.pass(25 * 60 * 60 * 1000);
  await send(draft());
});

it('is not sent again by a server that ended in the middle, and says so', async () => {
  await begin();
  await send(draft());
  await settled();
  await server.services.write((writer) =>
    writer.query(`UPDATE "brief_message" SET "recipients" = replace("recipients", '"outbox"', '"sending"')`),
  );
  const left = await server.freeze();
  server = await testServer({}, left);
  rmSync(left, { recursive: true, force: true });
  manager = await signInAs(server, team.people.manager);
  const [{ recipients }] = await settled();
  expect(recipients[0]).toMatchObject({
    status: 'failed',
    error: expect.stringContaining('may have arrived'),
  });
});
