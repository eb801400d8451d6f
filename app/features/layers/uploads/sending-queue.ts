import type { LayerPart } from '#contract/layers.ts';
import type { Progress } from '#app/lib/api-client.ts';

/** One file on its way to the server. */
export interface Sending {
  readonly key: number;
  readonly file: File;
  /** the part that it most likely plays; undefined where nothing says */
  readonly part: LayerPart | undefined;
  readonly state:
    | { readonly kind: 'waiting' }
    | { readonly kind: 'sending'; readonly progress: Progress }
    | { readonly kind: 'refused'; readonly error: unknown };
}

export type SendingEvent =
  | { type: 'dropped'; files: readonly File[]; guess: (file: File) => LayerPart | undefined }
  | { type: 'sending'; key: number; progress: Progress }
  | { type: 'refused'; key: number; error: unknown }
  | { type: 'removed'; key: number };

/** The files that were dropped, in the order they came. One that arrived is removed: the server then lists its upload. */
export function sendingQueue(sendings: readonly Sending[], event: SendingEvent): readonly Sending[] {
  const change = (key: number, state: Sending['state']) =>
    sendings.map((sending) => (sending.key === key ? { ...sending, state } : sending));
  switch (event.type) {
    case 'dropped': {
      const first = 1 + Math.max(0, ...sendings.map((sending) => sending.key));
      return [
        ...sendings,
        ...event.files.map((file, i) => ({
          key: first + i,
          file,
          part: event.guess(file),
          state: { kind: 'waiting' } as const,
        })),
      ];
    }
    case 'sending':
      return change(event.key, { kind: 'sending', progress: event.progress });
    case 'refused':
      return change(event.key, { kind: 'refused', error: event.error });
    case 'removed':
      return sendings.filter((sending) => sending.key !== event.key);
  }
}

/** The file to send now: one at a time, in the order they came. */
export const nextToSend = (sendings: readonly Sending[]): Sending | undefined =>
  sendings.some((sending) => sending.state.kind === 'sending')
    ? undefined
    : sendings.find((sending) => sending.state.kind === 'waiting');
