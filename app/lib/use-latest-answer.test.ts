import { act, cleanup, renderHook, waitFor } from '@testing-library/react';
import { afterEach, expect, it, vi } from 'vitest';
import { useLatestAnswer } from './use-latest-answer.ts';

afterEach(cleanup);

/** A desk that answers when the test says so. */
function startDesk() {
  const asked: string[] = [];
  const answers: { give: (answer: string) => void; fail: (why: Error) => void }[] = [];
  const close = vi.fn();
  const ask = (question: string) => {
    asked.push(question);
    return new Promise<string>((give, fail) => answers.push({ give, fail }));
  };
  return { asked, answers, close, open: () => ({ ask, close }) };
}

it('works on one question at a time, and passes over those that were overtaken while it did', async () => {
  const { asked, answers, close, open } = startDesk();
  const { result, rerender, unmount } = renderHook(({ question }) => useLatestAnswer(open, question), {
    initialProps: { question: undefined as string | undefined },
  });
  rerender({ question: 'a' });
  rerender({ question: 'b' });
  rerender({ question: 'c' });
  expect([asked, result.current]).toEqual([['a'], undefined]);
  act(() => answers[0].give('A'));
  await waitFor(() => expect(result.current).toEqual({ question: 'a', answer: 'A' }));
  expect(asked).toEqual(['a', 'c']);
  act(() => answers[1].give('C'));
  await waitFor(() => expect(result.current?.answer).toBe('C'));
  unmount();
  expect(close).toHaveBeenCalledOnce();
});

it('reports a question that fails, and goes on with the next', async () => {
  const report = vi.fn();
  vi.stubGlobal('reportError', report);
  const { answers, open } = startDesk();
  const { result, rerender } = renderHook(({ question }) => useLatestAnswer(open, question), {
    initialProps: { question: 'a' },
  });
  rerender({ question: 'b' });
  const why = new Error('no');
  act(() => answers[0].fail(why));
  await waitFor(() => expect(answers).toHaveLength(2));
  expect(report).toHaveBeenCalledExactlyOnceWith(why);
  act(() => answers[1].give('B'));
  await waitFor(() => expect(result.current?.answer).toBe('B'));
  vi.unstubAllGlobals();
});

it('leaves unsaid what comes after the desk was closed', async () => {
  const { asked, answers, open } = startDesk();
  const { rerender, unmount } = renderHook(({ question }) => useLatestAnswer(open, question), {
    initialProps: { question: 'a' },
  });
  rerender({ question: 'b' });
  unmount();
  answers[0].give('A');
  await Promise.resolve();
  await Promise.resolve();
  expect(asked).toEqual(['a']);
});
