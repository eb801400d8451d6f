import { createServer, type AddressInfo, type Server } from 'node:net';
import { afterEach, describe, expect, it } from 'vitest';
import { makeTeam } from '#server/testing/people.ts';
import { testServer, type TestServer } from '#server/testing/test-server.ts';
import { maskedLink } from './mail.ts';

let server: TestServer;
let mailServer: Server | undefined;
afterEach(async () => {
  await server.close();
  mailServer?.close();
  mailServer = undefined;
});

/** A mail server of the least kind (RFC 5321): it takes every message, or refuses every recipient. */
async function listen(refuse: boolean): Promise<{ url: string; received: string[] }> {
  const received: string[] = [];
  mailServer = createServer((socket) => {
    let data: string | undefined;
    socket.write('220 test\r\n');
    socket.on('error', () => undefined);
    socket.on('data', (chunk) => {
      for (const line of chunk.toString().split('\r\n').slice(0, -1)) {
        if (data !== undefined && line !== '.') data += `${line}\n`;
        else if (data !== undefined) {
          received.push(data);
          data = undefined;
          socket.write('250 taken\r\n');
        } else if (line === 'DATA') {
          data = '';
          socket.write('354 go on\r\n');
        } else if (line.startsWith('RCPT') && refuse) socket.write('550 no such mailbox\r\n');
        else if (line === 'QUIT') socket.end('221 bye\r\n');
        else socket.write('250 ok\r\n');
      }
    });
  });
  await new Promise<void>((resolve) => mailServer!.listen(0, '127.0.0.1', resolve));
  return { url: `smtp://127.0.0.1:${(mailServer.address() as AddressInfo).port}?ignoreTLS=true`, received };
}

/** Sends an invite and returns what the outbox says of it. */
async function invite() {
  const { teamId, agents } = await makeTeam(server, 'Shore team');
  const body = { email: 'new@people.example', role: 'trainer' };
  await agents.admin.post(`/api/teams/${teamId}/invites`).send(body).expect(200);
  const list = await agents.admin.get(`/api/teams/${teamId}/outbox`).expect(200);
  const [{ id }] = list.body.messages as { id: string }[];
  const message = await agents.admin.get(`/api/teams/${teamId}/outbox/${id}`).expect(200);
  const invites = await agents.admin.get(`/api/teams/${teamId}/invites`).expect(200);
  return {
    mailServer: list.body.mailServer as boolean,
    message: message.body as { status: string; error: string | null; text: string },
    invites: invites.body.invites as unknown[],
  };
}
const tokenIn = (text: string) => /\/invite\/([\w-]{43})/.exec(text)?.[1];

describe('an invite by e-mail', () => {
  it('goes to the mail server, and its link to nobody else', async () => {
    const { url, received } = await listen(false);
    server = await testServer({ smtpUrl: url });
    const { message, mailServer } = await invite();
    expect(mailServer).toBe(true);
    expect(message).toMatchObject({ status: 'sent', error: null });
    expect(received).toHaveLength(1);
    const letter = received[0].replace(/=\n/g, '');
    expect(letter).toContain('To: new@people.example');
    expect(tokenIn(letter)).toBeDefined();
    expect(message.text).toContain(maskedLink);
    expect(tokenIn(message.text)).toBeUndefined();
  });

  it('is not lost when the mail server refuses it: the admin sees why, and can hand the link over', async () => {
    const { url } = await listen(true);
    server = await testServer({ smtpUrl: url });
    const { message, invites } = await invite();
    expect(message).toMatchObject({ status: 'failed', error: expect.stringContaining('no such mailbox') });
    expect(invites).toHaveLength(1);
    await server.request.get(`/api/invites/${tokenIn(message.text)}`).expect(200);
  });

  it('is not lost when there is no mail server at the address', async () => {
    const { url } = await listen(false);
    await new Promise((resolve) => mailServer!.close(resolve));
    server = await testServer({ smtpUrl: url });
    const { message, invites } = await invite();
    expect(message).toMatchObject({ status: 'failed', error: expect.stringContaining('ECONNREFUSED') });
    expect(invites).toHaveLength(1);
  });

  it('stays here when no mail server is set', async () => {
    server = await testServer();
    const { message, mailServer } = await invite();
    expect(mailServer).toBe(false);
    expect(message.status).toBe('outbox');
    await server.request.get(`/api/invites/${tokenIn(message.text)}`).expect(200);
  });
});
