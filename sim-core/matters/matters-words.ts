import { allParameters } from '#sim-core/spec/all-parameters.ts';
import type { StudyFactor } from './study-design.ts';
import type { FactorWeight } from './weights.ts';

/** A factor as pages and files call it. */
export const factorLabel = (factor: StudyFactor): string =>
  factor === 'luck' ? 'Weather and chance' : allParameters[factor].label;

const within = (factor: StudyFactor) => factorLabel(factor).toLowerCase();
const list = (factors: readonly FactorWeight[]) => {
  const names = factors.map(({ factor }) => within(factor));
  return names.length < 2 ? names.join('') : `${names.slice(0, -1).join(', ')} and ${names.at(-1)}`;
};
const upper = (words: string) => words.charAt(0).toUpperCase() + words.slice(1);

/**
 * What decides, what hardly matters, and which rate is worth measuring better.
 *
 * @param weights from the one that matters most
 * @param what is measured: `years to recovery of “Mounds”`
 */
export function mattersWords(weights: readonly FactorWeight[], what: string): string {
  if (weights.length === 0) return `Nothing that was varied changes ${what}.`;
  const of = (standing: FactorWeight['standing']) => weights.filter((weight) => weight.standing === standing);
  const [decides, matters, hardly, unclear] = [of('decides'), of('matters'), of('hardly'), of('unclear')];
  const said: string[] = [];
  const verb = (group: readonly FactorWeight[], one: string, many: string) =>
    group.length === 1 && group[0].factor !== 'luck' ? one : many;
  if (decides.length > 0) said.push(`${upper(list(decides))} ${verb(decides, 'decides', 'decide')} ${what}.`);
  if (matters.length > 0)
    said.push(
      `${upper(list(matters))} ${verb(matters, 'matters', 'matter')}${decides.length > 0 ? ' too' : ` for ${what}, but nothing decides it`}.`,
    );
  if (hardly.length > 0) said.push(`${upper(list(hardly))} hardly ${verb(hardly, 'matters', 'matter')}.`);
  if (unclear.length > 0) said.push(`Of ${list(unclear)} it cannot be told yet; more runs would show it.`);
  const known = [...decides, ...matters];
  const rate = known.find(({ factor }) => factor !== 'luck');
  if (known[0]?.factor === 'luck')
    said.push(
      rate
        ? `Weather and chance weigh most, and no measuring takes them away; of the rates, ${within(rate.factor)} is worth measuring better first.`
        : 'That is no rate: measuring the plant better would not make this much surer.',
    );
  else if (rate) said.push(`${upper(within(rate.factor))} is worth measuring better first.`);
  return said.join(' ');
}
