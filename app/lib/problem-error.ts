import { problemSchema, type Problem, type ProblemCode } from '#contract/problem.ts';

/** What a person reads when there is no problem report to show. */
const noAnswer = 'No answer from the server. Check the connection, then try again.';
const unreadable =
  'The server sent an answer that this page cannot read. Reload the page; it may be out of date.';

/**
 * A request that did not succeed. `status` is 0 when no answer came; `code` is `unreachable` then, `unreadable` when
 * the answer was not what the contract says, else the problem's own code.
 */
export class ProblemError extends Error {
  override readonly name = 'ProblemError';
  readonly status: number;
  readonly code: ProblemCode | 'unreachable' | 'unreadable';
  readonly problem: Problem | undefined;

  constructor(status: number, code: ProblemError['code'], message: string, problem?: Problem) {
    super(message);
    this.status = status;
    this.code = code;
    this.problem = problem;
  }

  /** field → message, for the fields that the server found wrong */
  get fields(): Record<string, string> {
    return Object.fromEntries((this.problem?.fields ?? []).map(({ field, message }) => [field, message]));
  }

  static unreachable(): ProblemError {
    return new ProblemError(0, 'unreachable', noAnswer);
  }

  static unreadable(status: number): ProblemError {
    return new ProblemError(status, 'unreadable', unreadable);
  }

  /** From the body of a refused request; a body that is no problem report counts as unreadable. */
  static fromReply(status: number, body: string): ProblemError {
    const parsed = problemSchema.safeParse(parseJson(body));
    if (!parsed.success) return ProblemError.unreadable(status);
    return new ProblemError(status, parsed.data.code, parsed.data.detail, parsed.data);
  }
}

function parseJson(text: string): unknown {
  try {
    return JSON.parse(text) as unknown;
  } catch {
    return undefined;
  }
}

/** The sentence to show for whatever was thrown. */
export function errorText(error: unknown): string {
  return error instanceof Error && error.message !== ''
    ? error.message
    : 'Something went wrong on this page.';
}
