import { pino } from 'pino';
import { expect, it } from 'vitest';
import { closing, createBackground } from './background.ts';

const log = pino({ level: 'silent' });

/** A piece of work that ends when it is let go, or with the signal's reason. */
function held() {
  let release!: () => void;
  const gate = new Promise<void>((resolve) => {
    release = resolve;
  });
  let reason: unknown;
  let begun!: () => void;
  const started = new Promise<void>((resolve) => {
    begun = resolve;
  });
  return {
    release,
    started,
    reason: () => reason,
    work: ({ signal, onProgress }: { signal: AbortSignal; onProgress: (share: number) => void }) => {
      begun();
      onProgress(0.5);
      return Promise.race([
        gate,
        new Promise<void>((_, reject) =>
          signal.addEventListener('abort', () => {
            reason = signal.reason;
            reject(new Error('stopped', { cause: signal.reason }));
          }),
        ),
      ]);
    },
  };
}

it('does one piece after the other, each once, and says how far it is', async () => {
  const background = createBackground(log);
  const order: string[] = [];
  const first = held();
  background.start('first', first.work);
  background.start('second', () => Promise.resolve(void order.push('dropped')));
  background.start('third', () => Promise.resolve(void order.push('third')));
  background.start('second', () => Promise.resolve(void order.push('second')));
  await first.started;
  await Promise.resolve();
  expect(background.progressOf('first')).toMatchObject({
    share: 0.5,
    secondsLeft: expect.any(Number) as number,
  });
  expect(background.progressOf('second')).toBeUndefined();
  first.release();
  await background.idle();
  expect(order).toEqual(['third', 'second']);
  expect(background.progressOf('first')).toBeUndefined();
});

it('goes on after work that failed', async () => {
  const background = createBackground(log);
  let done = false;
  background.start('bad', () => Promise.reject(new Error('no')));
  background.start('good', () => Promise.resolve(void (done = true)));
  await background.idle();
  expect(done).toBe(true);
});

it('cancels what waits and what is under way, and waits for its end alone', async () => {
  const background = createBackground(log);
  const [first, second] = [held(), held()];
  background.start('first', first.work);
  background.start('waits', () => Promise.reject(new Error('must not begin')));
  background.start('second', second.work);
  await first.started;
  await background.cancel('waits');
  await background.cancel('first');
  expect(first.reason()).toMatchObject({ message: 'Cancelled' });
  await second.started;
  expect(second.reason()).toBeUndefined();
  second.release();
  await background.idle();
});

it('stops what is under way when it closes, and takes no more', async () => {
  const background = createBackground(log);
  const first = held();
  background.start('first', first.work);
  background.start('never', () => Promise.reject(new Error('must not begin')));
  await first.started;
  await background.close();
  expect(first.reason()).toBe(closing);
  background.start('late', () => Promise.reject(new Error('must not begin')));
  await background.idle();
});
