import { MessageChannel, type MessagePort } from 'node:worker_threads';
import { expose } from 'comlink';
import { vi } from 'vitest';

/** A worker as its client sees it, over a real message port, so that transfers and errors truly cross. */
export function portWorker(face: object) {
  const { port1, port2 } = new MessageChannel();
  expose(face, port2 as never);
  const own = new EventTarget();
  const listen = (port: MessagePort, type: string, f: EventListener, add: boolean) => {
    if (type === 'message')
      (port as unknown as EventTarget)[add ? 'addEventListener' : 'removeEventListener'](type, f);
    else own[add ? 'addEventListener' : 'removeEventListener'](type, f);
  };
  port1.start();
  const terminate = vi.fn(() => {
    port1.close();
    port2.close();
  });
  const worker = {
    postMessage: (message: unknown, buffers?: ArrayBuffer[]) => {
      port1.postMessage(message, buffers as never);
    },
    addEventListener: (type: string, f: EventListener) => {
      listen(port1, type, f, true);
    },
    removeEventListener: (type: string, f: EventListener) => {
      listen(port1, type, f, false);
    },
    terminate,
  } as unknown as Worker;
  return { worker, terminate, emit: (event: Event) => own.dispatchEvent(event) };
}
