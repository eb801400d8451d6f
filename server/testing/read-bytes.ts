import type supertest from 'supertest';

/** Asks for a download and reads all of it as text. */
export async function readBytes(request: supertest.Test): Promise<string> {
  const reply = await request.buffer(true).parse((response, done) => {
    const chunks: Buffer[] = [];
    response.on('data', (chunk: Buffer) => chunks.push(chunk));
    response.on('end', () => done(null, Buffer.concat(chunks)));
  });
  if (reply.status !== 200) throw new Error(`Expected 200, found ${reply.status}`);
  return (reply.body as Buffer).toString('utf8');
}
