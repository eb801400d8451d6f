import { ratesOfRun, uncertainNames } from '#sim-core/belief/rates-of-run.ts';
import { allParameters, type AnyRateName } from '#sim-core/spec/all-parameters.ts';
import type { FieldProblem } from '#sim-core/spec/problems.ts';
import type { RunSpec } from '#sim-core/spec/run-spec.ts';
import type { DrawnRates } from '#sim-core/spec/uncertain.ts';
import { rateProblems } from './grid-problems.ts';

type DrawnSpec = Pick<RunSpec, 'seed' | 'rates' | 'processes' | 'uncertain' | 'stepsPerYear'>;

/** What clashes where the engine refuses a drawn rate. */
const clashes: Readonly<Record<string, readonly AnyRateName[]>> = {
  'rates.lateralSpread': ['lateralSpread', 'fillRate', 'carryOver'],
  'rates.fillRate': ['fillRate'],
  'processes.grazers.grazerSpread': ['grazerSpread'],
};

/**
 * What makes any of an ensemble's replicates impossible for the rates that it draws, on cells of a size: found before
 * the first is run, so that no ensemble breaks off in the middle. Each kind of clash is told once, at the first of the
 * uncertain rates that are in it, with the first replicate that has it and how many have.
 *
 * @param replicates numbers 0 … replicates − 1 are looked at
 */
export function drawProblems(spec: DrawnSpec, cellSize: number, replicates: number): FieldProblem[] {
  const { uncertain, stepsPerYear } = spec;
  if (!uncertain) return [];
  const names = uncertainNames(uncertain);
  const found = new Map<string, { first: string; count: number; names: AnyRateName[] }>();
  for (let replicate = 0; replicate < replicates; replicate++) {
    const { rates, processes, drawn } = ratesOfRun({ ...spec, replicate });
    for (const { field, message } of rateProblems({ rates, processes, stepsPerYear }, cellSize)) {
      const before = found.get(field);
      if (before) before.count++;
      else {
        const involved = names.filter((name) => clashes[field]?.includes(name));
        const first = `Future ${replicate + 1} (${said(drawn, involved)}): ${message}`;
        found.set(field, { first, count: 1, names: involved });
      }
    }
  }
  return [...found].map(([field, { first, count, names: involved }]) => ({
    field: involved.length > 0 ? `uncertain.rates.${involved[0]}` : field,
    message:
      `${count} of ${replicates} futures draw rates that cannot be run. ${first}. ` +
      `Narrow what is believed of ${involved.map((name) => allParameters[name].label.toLowerCase()).join(' or ')}`,
  }));
}

const said = (drawn: DrawnRates, names: readonly AnyRateName[]): string =>
  names
    .map((name) => `${allParameters[name].label.toLowerCase()} ${Number(drawn[name]!.toPrecision(3))}`)
    .join(', ');
