import { formatCoordinate } from './map-ticks.ts';

interface MapControlsProps {
  readonly onZoom: (factor: number) => void;
  readonly onWhole: () => void;
}

/** Zoom in, zoom out, the whole site. */
export function MapControls({ onZoom, onWhole }: MapControlsProps) {
  const button =
    'grid size-[30px] place-items-center border-b border-rule text-ink last:border-b-0 hover:bg-ink hover:text-ground touch:size-11';
  const icon = (d: string) => (
    <svg width={14} height={14} fill="none" stroke="currentColor" strokeWidth={1.6} aria-hidden="true">
      <path d={d} />
    </svg>
  );
  return (
    <div className="absolute top-10 right-0 border-y border-l border-ink bg-ground">
      <button
        type="button"
        className={button}
        aria-label="Zoom in"
        onClick={() => {
          onZoom(1.6);
        }}
      >
        {icon('M7 1v12M1 7h12')}
      </button>
      <button
        type="button"
        className={button}
        aria-label="Zoom out"
        onClick={() => {
          onZoom(1 / 1.6);
        }}
      >
        {icon('M1 7h12')}
      </button>
      <button type="button" className={button} aria-label="Show the whole site" onClick={onWhole}>
        {icon('M1 4.500v-3.500h3.500M9.500 1h3.500v3.500M13 9.500v3.500h-3.500M4.500 13h-3.500v-3.500')}
      </button>
    </div>
  );
}

interface MapReadingProps {
  readonly x: number;
  readonly y: number;
  readonly reading: string;
  /** whether the words are to be read aloud: a pointer would chatter */
  readonly spoken: boolean;
  readonly compact: boolean;
}

/** The cell under the pointer or the crosshair: what it holds, and where it is. */
export function MapReading({ x, y, reading, spoken, compact }: MapReadingProps) {
  return (
    <div
      className={`pointer-events-none absolute right-0 flex gap-3 border border-r-0 border-ink bg-ground px-2.5 py-1 text-note whitespace-nowrap ${compact ? 'top-0 border-t-0' : 'bottom-0 border-b-0'}`}
      aria-live={spoken ? 'polite' : 'off'}
    >
      {reading && <span className="font-semibold">{reading}</span>}
      <span className="font-mono text-ink-2">
        E {formatCoordinate(x)} N {formatCoordinate(y)}
      </span>
    </div>
  );
}

interface MapUnavailableProps {
  readonly problem: 'unsupported' | 'lost';
  readonly summary: string;
  readonly onAgain: () => void;
}

/** In place of a blank box: why there is no picture, what it would show, and what can be done. */
export function MapUnavailable({ problem, summary, onAgain }: MapUnavailableProps) {
  return (
    <div role="alert" className="absolute inset-0 grid place-content-center bg-standing p-6">
      <div className="max-w-[52ch] border-l-[5px] border-ink bg-ground px-4 py-3">
        <p className="font-bold">
          {problem === 'lost'
            ? 'The browser has taken back the memory of this map.'
            : 'This browser cannot draw the map.'}
        </p>
        <p className="mt-1">{summary}</p>
        <p className="mt-1 text-note text-ink-2">
          {problem === 'lost'
            ? 'Nothing of your work is lost.'
            : 'It needs WebGL 2, which is switched off or missing here: turn on hardware acceleration in the browser’s settings, or use another browser.'}
        </p>
        <button
          type="button"
          className="mt-2 min-h-[34px] border-[1.5px] border-ink px-3.5 font-semibold hover:bg-ink hover:text-sheet touch:min-h-11"
          onClick={onAgain}
        >
          Draw it again
        </button>
      </div>
    </div>
  );
}
