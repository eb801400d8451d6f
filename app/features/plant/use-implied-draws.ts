import { releaseProxy, wrap } from 'comlink';
import { useEffect, useRef, useState } from 'react';
import type { ImpliedDraws, ImpliedQuestion } from './implied-draws.ts';
import type { ImpliedFace } from './implied-worker.ts';

/**
 * What the rates imply over many draws of what is believed, worked out off the page's thread: of the latest question as
 * soon as it is there, until then of the one before. Undefined before the first.
 */
export function useImpliedDraws(question: ImpliedQuestion): ImpliedDraws | undefined {
  const [implied, setImplied] = useState<ImpliedDraws>();
  const desk = useRef<{ ask: ImpliedFace['impliedDraws']; busy: boolean; next: ImpliedQuestion | undefined }>(
    undefined,
  );
  useEffect(() => {
    const worker = new Worker(new URL('./implied-worker.ts', import.meta.url), {
      type: 'module',
      name: 'implied',
    });
    const remote = wrap<ImpliedFace>(worker);
    desk.current = {
      ask: remote.impliedDraws as unknown as ImpliedFace['impliedDraws'],
      busy: false,
      next: undefined,
    };
    return () => {
      desk.current = undefined;
      remote[releaseProxy]();
      worker.terminate();
    };
  }, []);
  useEffect(() => {
    const work = async () => {
      const at = desk.current;
      if (!at) return;
      at.next = question;
      // One at a time: of what came meanwhile, the latest is asked when the answer is there.
      if (at.busy) return;
      at.busy = true;
      while (at.next && desk.current === at) {
        const asked = at.next;
        at.next = undefined;
        const made = await Promise.resolve(at.ask(asked));
        if (desk.current === at) setImplied(made);
      }
      at.busy = false;
    };
    // As an error of the page, where the browser's own tools and the tests look for it.
    work().catch(reportError);
  }, [question]);
  return implied;
}
