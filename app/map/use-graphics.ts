import { useCallback, useState } from 'react';

/** Whether the browser gives a WebGL 2 context; the one it was asked with is handed back at once. */
function hasWebGl2(): boolean {
  const context = document.createElement('canvas').getContext('webgl2');
  context?.getExtension('WEBGL_lose_context')?.loseContext();
  return context !== null;
}

export interface Graphics {
  readonly ready: boolean;
  readonly problem: 'unsupported' | 'lost' | undefined;
  /** rises when the scene must be made anew */
  readonly generation: number;
  readonly lose: () => void;
  readonly again: () => void;
}

/** Keeps track of whether the map can be painted, and of starting over after the context was lost. */
export function useGraphics(): Graphics {
  const [problem, setProblem] = useState<Graphics['problem']>(() =>
    hasWebGl2() ? undefined : 'unsupported',
  );
  const [generation, setGeneration] = useState(0);
  const lose = useCallback(() => {
    setProblem('lost');
  }, []);
  const again = useCallback(() => {
    setProblem(hasWebGl2() ? undefined : 'unsupported');
    setGeneration((n) => n + 1);
  }, []);
  return { ready: problem === undefined, problem, generation, lose, again };
}
