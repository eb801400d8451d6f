import type { Grid } from '#sim-core/grid/grid.ts';
import type { Ground } from '#sim-core/grid/ground.ts';
import type { RunResult, SeriesRow } from '#sim-core/spec/run-result.ts';
import type { RunSpec } from '#sim-core/spec/run-spec.ts';

/** A layer that a spec names. */
export interface PackedLayer {
  /** its cells in the binary of `rasters/cells/cell-values.ts` */
  readonly packed: Blob;
  readonly noData: number | null;
}
/** The layers that a spec names, by hash. */
export type PackedLayers = ReadonlyMap<string, PackedLayer>;

/** What a run starts from. */
export interface RunInput {
  readonly spec: RunSpec;
  readonly grid: Grid;
  /** ready, or the layers from which the worker builds it, so that the page need not */
  readonly ground: Ground | PackedLayers;
}

/** One year that is done; the survey comes first. `frame` and `packed` are there for reported years alone. */
export interface YearEvent {
  readonly year: number;
  readonly rows: SeriesRow[];
  /** round(255·C), row-major */
  readonly frame?: Uint8Array;
  /** the frame in the binary of `rasters/cells/cell-values.ts`, ready to be stored */
  readonly packed?: Blob;
}

export interface RunProgress {
  readonly stepsDone: number;
  readonly steps: number;
  /** from the pace so far, waiting left out; undefined until a step is done; the first word, at 0 steps, comes at once */
  readonly secondsLeft: number | undefined;
}

export interface RunOutcome {
  readonly result: RunResult;
  /** closing year of every cell: 0 still open at the horizon, -32768 cannot hold the plant */
  readonly closing: Int16Array;
  /** the closing years in the binary of `rasters/cells/cell-values.ts` */
  readonly packedClosing: Blob;
}

export interface RunListener {
  /** The year counts as acknowledged when this returns, or when its promise does; a rejection ends the run. */
  onYear(event: YearEvent): void | Promise<void>;
  onProgress?(progress: RunProgress): void;
  /** Paused, and the year that was being worked on is done. */
  onStandstill?(): void;
}

/** The face of the engine that the loop drives. */
export interface StepwiseRun {
  readonly survey: EngineYear;
  /** `onStep` is told how many of all the run's steps are done. */
  nextYear(onStep?: (done: number, of: number) => void): EngineYear | undefined;
  closing(): Int16Array;
  result(): RunResult;
}
interface EngineYear {
  readonly year: number;
  readonly rows: SeriesRow[];
  readonly frame: Uint8Array | undefined;
}

export interface RunLoopParts {
  readonly createRun: (input: RunInput) => StepwiseRun | Promise<StepwiseRun>;
  readonly pack: (cells: { width: number; height: number; values: Uint8Array | Int16Array }) => Blob;
  /** milliseconds, for the pace alone: no result depends on it */
  readonly now: () => number;
}

export interface RunLoop {
  /** Runs to the horizon. @throws whatever the engine throws, or the listener rejects with */
  run(input: RunInput, listener: RunListener): Promise<RunOutcome>;
  /** Stops after the year that is being worked on. */
  pause(): void;
  resume(): void;
  /** One more year, then stands still. */
  step(): void;
}

/** Years that may be on their way to whoever saves them before the run waits. */
export const unacknowledgedLimit = 4;
const progressEvery = 100;

/** Drives a run year by year, so that it can be paused, stepped and slowed by whoever saves its years. */
export function createRunLoop({ createRun, pack, now }: RunLoopParts): RunLoop {
  let paused = false;
  let allowed = 0;
  let wake: (() => void) | undefined;

  async function permission(listener: RunListener) {
    while (paused && allowed === 0) {
      listener.onStandstill?.();
      await new Promise<void>((resolve) => (wake = resolve));
    }
    if (paused) allowed--;
  }

  async function run(input: RunInput, listener: RunListener): Promise<RunOutcome> {
    const { spec, grid } = input;
    const steps = spec.years * spec.stepsPerYear;
    const cells = { width: grid.width, height: grid.height };
    const waiting = new Set<Promise<void>>();
    const { turn, close } = createTurns();
    let active = 0;
    let saidAt = -Infinity;

    const send = ({ year, rows, frame }: EngineYear) => {
      const event = { year, rows, frame, packed: frame && pack({ ...cells, values: frame }) };
      const saved: Promise<void> = (async () => listener.onYear(event))().then(() => {
        waiting.delete(saved);
      });
      // It is awaited below; this keeps a rejection that comes first from counting as unhandled.
      saved.catch(() => undefined);
      waiting.add(saved);
    };
    const say = (stepsDone: number, milliseconds: number) => {
      const secondsLeft = stepsDone > 0 ? (milliseconds / 1000 / stepsDone) * (steps - stepsDone) : undefined;
      saidAt = now();
      listener.onProgress?.({ stepsDone, steps, secondsLeft });
    };

    try {
      say(0, 0);
      const engine = await createRun(input);
      send(engine.survey);
      for (let year = 0; ; year++) {
        await turn();
        await permission(listener);
        while (waiting.size >= unacknowledgedLimit) await Promise.race(waiting);
        const begun = now();
        const outcome = engine.nextYear((done) => {
          if (now() - saidAt >= progressEvery) say(done, active + now() - begun);
        });
        if (!outcome) break;
        send(outcome);
        active += now() - begun;
        say((year + 1) * spec.stepsPerYear, active);
      }
      await Promise.all(waiting);
      const closing = engine.closing();
      return { result: engine.result(), closing, packedClosing: pack({ ...cells, values: closing }) };
    } finally {
      close();
    }
  }

  return {
    run,
    pause: () => {
      paused = true;
      allowed = 0;
    },
    resume: () => {
      paused = false;
      wake?.();
    },
    step: () => {
      paused = true;
      allowed++;
      wake?.();
    },
  };
}

/** Gives way to messages that wait. A timer would do it too, but browsers hold nested ones back by 4 ms. */
function createTurns() {
  const { port1, port2 } = new MessageChannel();
  let arrived: (() => void) | undefined;
  port1.onmessage = () => arrived?.();
  return {
    turn: () =>
      new Promise<void>((resolve) => {
        arrived = resolve;
        port2.postMessage(0);
      }),
    close: () => {
      port1.close();
    },
  };
}

/** Buffers of a ready ground, each once, to be handed over instead of copied; blobs cost nothing to send. */
export function groundBuffers(ground: RunInput['ground']): ArrayBuffer[] {
  if (isPacked(ground)) return [];
  const { capacity, vigour, exposure, refuge, fence, cover } = ground;
  return [...new Set([capacity, vigour, exposure, refuge, fence, cover].map((a) => a.buffer as ArrayBuffer))];
}

export const isPacked = (ground: RunInput['ground']): ground is PackedLayers => ground instanceof Map;
