/** Where progress is shown, and the time in ms that it is measured by. */
export interface ProgressTarget {
  write(text: string): void;
  /** overwrite one line instead of adding lines */
  readonly isTerminal: boolean;
  now(): number;
}

/**
 * Shows how far a job is and how long it will still take, judged by its pace so far.
 *
 * @returns to be told how many of how many steps are done, and in what (`replicate 3 of 20`)
 */
export function showProgress(target: ProgressTarget) {
  const start = target.now();
  let shown = -Infinity;
  return (done: number, of: number, what = ''): void => {
    const now = target.now();
    const every = target.isTerminal ? 200 : 5000;
    if (done < of && now - shown < every) return;
    shown = now;
    const left = ((now - start) / done) * (of - done);
    const line = `${done} of ${of} steps${what && `, ${what}`}${done < of ? `, ${duration(left)} left` : `, took ${duration(now - start)}`}`;
    if (target.isTerminal) target.write(`\r\u001b[K${line}${done < of ? '' : '\n'}`);
    else target.write(`${line}\n`);
  };
}

/** A length of time in words. */
export function duration(milliseconds: number): string {
  const seconds = Math.round(milliseconds / 1000);
  if (seconds < 90) return `${seconds} s`;
  const minutes = Math.round(seconds / 60);
  if (minutes < 90) return `${minutes} min`;
  return `${Math.floor(minutes / 60)} h ${minutes % 60} min`;
}
