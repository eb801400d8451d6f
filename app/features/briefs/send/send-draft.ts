import { sendBrief } from '#contract/briefs.ts';

export interface SendDraft {
  /** addresses as typed, apart by commas, semicolons, blanks or lines */
  readonly to: string;
  readonly subject: string;
  readonly text: string;
  readonly attach: boolean;
}

/** The addresses in what was typed, each once. */
export const addressesIn = (typed: string): string[] => [
  ...new Set(
    typed
      .split(/[\s,;]+/)
      .map((each) => each.replace(/^<|>$/g, '').toLowerCase())
      .filter(Boolean),
  ),
];

/** What keeps a message from being sent, in words, by field; empty where nothing does. */
export function sendProblems(draft: SendDraft): Partial<Record<'to' | 'subject' | 'text', string>> {
  const { body } = sendBrief;
  const to = addressesIn(draft.to);
  const wrong = to.find((each) => !body.shape.to.element.safeParse(each).success);
  const list = body.shape.to.safeParse(to);
  const problemOf = (field: 'subject' | 'text') =>
    body.shape[field].safeParse(draft[field]).error?.issues[0].message;
  const problems = {
    to: wrong
      ? `“${wrong}” is no e-mail address; expected one such as name@example.org`
      : list.error?.issues[0].message,
    subject: problemOf('subject'),
    text: problemOf('text'),
  };
  return Object.fromEntries(Object.entries(problems).filter(([, problem]) => problem !== undefined));
}
