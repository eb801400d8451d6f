import type { Action } from '#sim-core/spec/run-spec.ts';
import { titleOf } from './works-words.ts';
import type { Work } from './works.ts';

/** The one place that works stand on, or undefined for works of several places or of an outline. */
export function placeKey(work: Work): string | undefined {
  if (work.kind === 'mound') return `${work.x} ${work.y}`;
  if (work.kind === 'clumps') return work.points.length === 1 ? work.points[0].join(' ') : undefined;
  if (work.kind !== 'planting' || work.area.shape !== 'disc') return undefined;
  return `${work.area.x} ${work.area.y}`;
}

/** The works without what is planted on one of their mounds: what is counted, found and named as one. */
export function withoutPlanted(works: readonly Work[]): Work[] {
  const mounds = new Set(works.filter((work) => work.kind === 'mound').map(placeKey));
  return works.filter((work) => work.kind === 'mound' || !mounds.has(placeKey(work) ?? ''));
}

/**
 * What each of the works is called, by id: its name, or what it is with the smallest number that is free among its kind,
 * in order. What is planted on a mound is called after it.
 */
export function workTitles(works: readonly Work[]): Map<string, string> {
  const named = new Set(works.map((work) => work.name));
  const last = new Map<Action['kind'], number>();
  const titles = new Map<string, string>();
  const mounds = new Map<string, string>();
  const next = (work: Work): string => {
    let number = (last.get(work.kind) ?? 0) + 1;
    while (named.has(titleOf(work, number))) number++;
    last.set(work.kind, number);
    return titleOf(work, number);
  };
  for (const work of works) {
    if (work.kind !== 'mound') continue;
    const title = work.name ?? next(work);
    titles.set(work.id, title);
    const place = placeKey(work);
    if (place !== undefined && !mounds.has(place)) mounds.set(place, title);
  }
  for (const work of works) {
    if (work.kind === 'mound') continue;
    const mound = mounds.get(placeKey(work) ?? '');
    titles.set(
      work.id,
      work.name ??
        (mound === undefined ? next(work) : `${work.kind === 'clumps' ? 'Clumps' : 'Planting'} on ${mound}`),
    );
  }
  return titles;
}

/** `Reed edge (copy)`, or with the smallest number that is free: `Reed edge (copy 2)`; at most `longest` letters. */
export function copyName(name: string, taken: readonly string[], longest = 100): string {
  const bare = name.replace(/ \(copy(?: \d+)?\)$/, '');
  for (let number = 1; ; number++) {
    const end = number === 1 ? ' (copy)' : ` (copy ${number})`;
    const tried = bare.slice(0, longest - end.length) + end;
    if (!taken.includes(tried)) return tried;
  }
}

/** `Option 3`: the smallest number that no other name uses. */
export function freeName(word: string, taken: readonly string[]): string {
  let number = 1;
  while (taken.includes(`${word} ${number}`)) number++;
  return `${word} ${number}`;
}
