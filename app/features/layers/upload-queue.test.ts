import { describe, expect, it } from 'vitest';
import type { LayerPart } from '#contract/layers.ts';
import { doubledParts, nextUpload, uploadQueue, type Upload } from './upload-queue.ts';

const file = (name: string) => new File(['x'], name);
const drop = (names: string[], guess: (file: File) => LayerPart | undefined = () => undefined) =>
  uploadQueue([], { type: 'dropped', files: names.map(file), guess });
const kinds = (uploads: readonly Upload[]) => uploads.map((u) => u.state.kind);

describe('uploadQueue', () => {
  it('asks each file for its part before anything is sent', () => {
    const uploads = drop(['a.tif', 'b.tif'], (f) => (f.name === 'a.tif' ? 'habitat' : undefined));
    expect(uploads.map((u) => [u.key, u.part])).toEqual([
      [1, 'habitat'],
      [2, undefined],
    ]);
    expect(nextUpload(uploads)).toBeUndefined();
    const confirmed = uploadQueue(uploads, { type: 'confirmed', keys: [1, 2] });
    expect(kinds(confirmed)).toEqual(['waiting', 'asking']);
  });

  it('sends one file at a time, and goes on after a refusal', () => {
    let uploads = drop(['a.tif', 'b.tif'], () => 'cover');
    uploads = uploadQueue(uploads, { type: 'confirmed', keys: [1, 2] });
    expect(nextUpload(uploads)?.key).toBe(1);
    uploads = uploadQueue(uploads, { type: 'sending', key: 1, progress: { sent: 0, total: 9 } });
    expect(nextUpload(uploads)).toBeUndefined();
    uploads = uploadQueue(uploads, { type: 'refused', key: 1, error: new Error('no') });
    expect(kinds(uploads)).toEqual(['refused', 'waiting']);
    expect(nextUpload(uploads)?.key).toBe(2);
  });

  it('never gives a key twice while files are there', () => {
    let uploads = drop(['a.tif', 'b.tif']);
    uploads = uploadQueue(uploads, { type: 'removed', key: 1 });
    uploads = uploadQueue(uploads, { type: 'dropped', files: [file('c.tif')], guess: () => undefined });
    expect(uploads.map((u) => u.key)).toEqual([2, 3]);
  });

  it('tells when two files want the same part', () => {
    let uploads = drop(['a.tif', 'b.tif'], () => 'cover');
    expect(doubledParts(uploads)).toEqual(['cover']);
    uploads = uploadQueue(uploads, { type: 'chose', key: 2, part: 'refuge' });
    expect(doubledParts(uploads)).toEqual([]);
  });
});
