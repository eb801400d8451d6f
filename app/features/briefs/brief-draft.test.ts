import { beforeEach, describe, expect, it } from 'vitest';
import { briefParts, type BriefText } from '#contract/brief-content.ts';
import {
  draftProblem,
  keepBriefDraft,
  keptBriefDraft,
  movePart,
  withPart,
  withTitle,
} from './brief-draft.ts';
import { addressesIn, sendProblems } from './send/send-draft.ts';

const text: BriefText = {
  title: 'Marsh: mounds',
  parts: briefParts.map((part) => ({ part, heading: `About ${part}`, words: '', shown: true })),
};
const order = ({ parts }: BriefText) => parts.map(({ part }) => part);
beforeEach(() => window.localStorage.clear());

describe('a draft of a brief', () => {
  it('moves parts one place, and no further than the page', () => {
    expect(order(movePart(text, 'maps', -1)).slice(0, 3)).toEqual(['question', 'maps', 'answer']);
    expect(order(movePart(text, 'question', 1)).slice(0, 2)).toEqual(['answer', 'question']);
    expect(movePart(text, 'question', -1)).toBe(text);
    expect(movePart(text, 'cautions', 1)).toBe(text);
  });
  it('changes one part and leaves the others', () => {
    const changed = withPart(text, 'cost', { words: 'Too much.' });
    expect(changed.parts.filter(({ words }) => words !== '').map(({ part }) => part)).toEqual(['cost']);
  });
  it('says in words what keeps it from being saved', () => {
    expect(draftProblem(text)).toBeUndefined();
    expect(draftProblem(withTitle(text, ' '))).toBe('The title: Fill this in');
    expect(draftProblem(withPart(text, 'cost', { words: 'x'.repeat(3001) }))).toBe(
      'About cost: At most 3000 characters',
    );
  });
  it('is kept in the browser, in the middle of its writing too, and forgotten', () => {
    const draft = { base: 3, text: withTitle(text, '') };
    keepBriefDraft('a', draft);
    expect(keptBriefDraft('a')).toEqual(draft);
    expect(keptBriefDraft('b')).toBeUndefined();
    keepBriefDraft('a', undefined);
    expect(keptBriefDraft('a')).toBeUndefined();
    window.localStorage.setItem('foothold.brief.a', '{"base":"no"}');
    expect(keptBriefDraft('a')).toBeUndefined();
  });
});

describe('a message', () => {
  const draft = {
    to: 'A@people.example; b@people.example,\n a@people.example',
    subject: 'Brief',
    text: 'Hello',
    attach: true,
  };
  it('finds addresses however they are set apart, each once', () => {
    expect(addressesIn(draft.to)).toEqual(['a@people.example', 'b@people.example']);
    expect(addressesIn(' , ')).toEqual([]);
  });
  it('names what is wrong before anything goes out', () => {
    expect(sendProblems(draft)).toEqual({});
    expect(sendProblems({ ...draft, to: 'board' }).to).toMatch(/“board” is no e-mail address/);
    expect(sendProblems({ ...draft, to: '' }).to).toMatch(/at least one/);
    expect(sendProblems({ ...draft, subject: ' ', text: '' })).toEqual({
      subject: 'Fill this in',
      text: 'Fill this in',
    });
  });
});
