/** What the page notes of itself while it is measured; times of `performance.now()`, ms. */
export interface Probe {
  /** the quick look's worker was made */
  opened: number | undefined;
  /** the pointer moved, as the browser stamped it */
  moved: number | undefined;
  /** what happened since, in order, for those who look for what takes the time */
  notes: { what: string; at: number }[];
  /** closing years of `size` cells a side were handed to the graphics card and drawn, and the frame was done */
  answered: number[];
}

/** Runs in the page before its own code. Notes uploads of rasters `size` cells wide, and the frame that shows them. */
export function installProbe(size: number): void {
  const probe: Probe = { opened: undefined, moved: undefined, notes: [], answered: [] };
  Object.assign(window, { benchProbe: probe });
  const note = (what: string) => probe.notes.push({ what, at: performance.now() });
  const OwnWorker = window.Worker;
  window.Worker = class extends OwnWorker {
    constructor(address: string | URL, options?: WorkerOptions) {
      super(address, options);
      if (options?.name !== 'quick look') return;
      probe.opened ??= performance.now();
      this.addEventListener('message', () => note('message'));
    }
  };
  window.addEventListener(
    'pointermove',
    (event) => {
      probe.moved ??= event.timeStamp;
      note('pointer');
    },
    true,
  );
  let uploaded = false;
  const gl = WebGL2RenderingContext.prototype;
  for (const name of ['texImage2D', 'texSubImage2D'] as const) {
    const upload = Reflect.get(gl, name) as (...words: unknown[]) => void;
    Object.assign(gl, {
      [name](this: WebGL2RenderingContext, ...words: unknown[]) {
        if (words.slice(3, 6).includes(size)) {
          uploaded = true;
          note('upload');
        }
        upload.apply(this, words);
      },
    });
  }
  const draw = Reflect.get(gl, 'drawElements');
  gl.drawElements = function (...words) {
    draw.apply(this, words);
    if (!uploaded) return;
    uploaded = false;
    note('draw');
    // After this frame's paint: a message waits until the frame is handed over.
    requestAnimationFrame(() => {
      const { port1, port2 } = new MessageChannel();
      port1.onmessage = () => {
        note('frame');
        probe.answered.push(performance.now());
      };
      port2.postMessage(undefined);
    });
  };
}
