import type supertest from 'supertest';

/** Has the body of a reply kept as a Buffer, whatever its type. */
export const binaryReply = (request: supertest.Test): supertest.Test =>
  request.buffer(true).parse((response, done) => {
    const stream = response as unknown as NodeJS.ReadableStream;
    const chunks: Buffer[] = [];
    stream.on('data', (chunk: Buffer) => chunks.push(chunk));
    stream.on('end', () => done(null, Buffer.concat(chunks)));
  });
