import type { Request, RequestHandler } from 'express';
import multer, { type StorageEngine } from 'multer';
import { fieldProblem } from '../middleware/problem-error.ts';
import type { BlobStore, ReceivedFile } from './blob-store.ts';

interface Upload {
  received?: ReceivedFile;
}

/** Streams the file of a form into the folder of arrivals. */
const arrivals = (blobs: BlobStore, limit: number): StorageEngine => ({
  _handleFile(_request, file, done) {
    blobs.receive(file.stream, limit).then(
      (received) => done(null, { received } as Partial<Express.Multer.File>),
      (error: unknown) => done(error),
    );
  },
  _removeFile(_request, file, done) {
    const { received } = file as Upload;
    if (!received) return done(null);
    blobs.discard(received).then(() => done(null), done);
  },
});

/**
 * Reads a form with one `file` and a few short text fields. The file is hashed and written to disk as it comes; whatever
 * becomes of the request, an arrival that was not kept is gone when the reply is out.
 * @param limit the largest file, bytes
 */
export function rasterForm(blobs: BlobStore, limit: number): RequestHandler {
  const read = multer({
    storage: arrivals(blobs, limit),
    limits: { fileSize: limit, files: 1, fields: 8, parts: 9, fieldSize: 2048, fieldNameSize: 100 },
  }).single('file');
  return (request, response, next) => {
    response.once('close', () => {
      const { received } = (request.file ?? {}) as Upload;
      // A leftover that cannot be removed now is cleared at the next start.
      if (received) blobs.discard(received).catch(() => undefined);
    });
    void read(request, response, next);
  };
}

/**
 * The file of a form that `rasterForm` has read.
 * @throws ProblemError at `file` when there was none
 */
export function receivedRaster(request: Request): { file: ReceivedFile; fileName: string } {
  const { received } = (request.file ?? {}) as Upload;
  if (!request.file || !received) throw fieldProblem('file', 'Expected one GeoTIFF in the field `file`');
  return { file: received, fileName: request.file.originalname };
}
