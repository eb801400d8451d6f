import { useEffect, useRef, useState } from 'react';

/** Whoever answers questions away from the page's thread: a worker and what it takes to ask it. */
export interface AnswerDesk<Question, Answer> {
  readonly ask: (question: Question) => Promise<Answer>;
  readonly close: () => void;
}

export interface LatestAnswer<Question, Answer> {
  /** what was asked, so that an answer to an older question can be told */
  readonly question: Question;
  readonly answer: Answer;
}

/**
 * The answer to the latest question; until it is there the one before, undefined before the first. Questions change faster
 * than answers come, so one is worked on at a time and only the last of those that wait.
 *
 * @param open starts the desk; the same function as long as the same desk is meant
 * @param question another object or string is another question; undefined: nothing is asked
 * @param rest how many times as long as an answer took the desk rests before the next, so that other work gets the cores
 */
export function useLatestAnswer<Question, Answer>(
  open: () => AnswerDesk<Question, Answer>,
  question: Question | undefined,
  rest = 0,
): LatestAnswer<Question, Answer> | undefined {
  const [latest, setLatest] = useState<LatestAnswer<Question, Answer>>();
  type Desk = AnswerDesk<Question, Answer>;
  const opened = useRef<{ ask: Desk['ask']; busy: boolean; next: Question | undefined }>(undefined);
  useEffect(() => {
    const desk = open();
    opened.current = { ask: desk.ask, busy: false, next: undefined };
    return () => {
      opened.current = undefined;
      desk.close();
    };
  }, [open]);
  useEffect(() => {
    const at = opened.current;
    if (question === undefined || at === undefined) return;
    at.next = question;
    if (at.busy) return;
    const work = async () => {
      at.busy = true;
      while (at.next !== undefined && opened.current === at) {
        const asked = at.next;
        at.next = undefined;
        const begun = performance.now();
        try {
          const answer = await at.ask(asked);
          if (opened.current === at) setLatest({ question: asked, answer });
        } catch (error) {
          // As an error of the page, where the browser's own tools and the tests look for it.
          if (opened.current === at) reportError(error);
        }
        if (rest > 0) await new Promise((done) => setTimeout(done, rest * (performance.now() - begun)));
      }
      at.busy = false;
    };
    void work();
  }, [open, question, rest]);
  return latest;
}
