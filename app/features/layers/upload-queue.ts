import type { LayerPart } from '#contract/layers.ts';
import type { Progress } from '#app/lib/api-client.ts';

/** One file on its way to the site. */
export interface Upload {
  readonly key: number;
  readonly file: File;
  /** the part it is to play; undefined until somebody says */
  readonly part: LayerPart | undefined;
  readonly state:
    | { readonly kind: 'asking' }
    | { readonly kind: 'waiting' }
    | { readonly kind: 'sending'; readonly progress: Progress }
    | { readonly kind: 'refused'; readonly error: unknown };
}

export type UploadEvent =
  | { type: 'dropped'; files: readonly File[]; guess: (file: File) => LayerPart | undefined }
  | { type: 'chose'; key: number; part: LayerPart }
  | { type: 'confirmed'; keys: readonly number[] }
  | { type: 'sending'; key: number; progress: Progress }
  | { type: 'refused'; key: number; error: unknown }
  | { type: 'removed'; key: number };

/** The files of a drop zone, in the order they came. A file that arrived is removed: the site then lists its layer. */
export function uploadQueue(uploads: readonly Upload[], event: UploadEvent): readonly Upload[] {
  const change = (key: number, next: Partial<Upload>) =>
    uploads.map((upload) => (upload.key === key ? { ...upload, ...next } : upload));
  switch (event.type) {
    case 'dropped': {
      const first = 1 + Math.max(0, ...uploads.map((upload) => upload.key));
      return [
        ...uploads,
        ...event.files.map((file, i) => ({
          key: first + i,
          file,
          part: event.guess(file),
          state: { kind: 'asking' } as const,
        })),
      ];
    }
    case 'chose':
      return change(event.key, { part: event.part });
    case 'confirmed':
      return uploads.map((upload) =>
        event.keys.includes(upload.key) && upload.part !== undefined
          ? { ...upload, state: { kind: 'waiting' } }
          : upload,
      );
    case 'sending':
      return change(event.key, { state: { kind: 'sending', progress: event.progress } });
    case 'refused':
      return change(event.key, { state: { kind: 'refused', error: event.error } });
    case 'removed':
      return uploads.filter((upload) => upload.key !== event.key);
  }
}

/** The file to send now: one at a time, in the order they came. */
export const nextUpload = (uploads: readonly Upload[]): Upload | undefined =>
  uploads.some((upload) => upload.state.kind === 'sending')
    ? undefined
    : uploads.find((upload) => upload.state.kind === 'waiting');

/** Parts that two waiting files would both play: the second would replace the first. */
export function doubledParts(uploads: readonly Upload[]): LayerPart[] {
  const seen = new Set<LayerPart>();
  const doubled = new Set<LayerPart>();
  for (const { part, state } of uploads) {
    if (part === undefined || state.kind === 'refused') continue;
    if (seen.has(part)) doubled.add(part);
    seen.add(part);
  }
  return [...doubled];
}
