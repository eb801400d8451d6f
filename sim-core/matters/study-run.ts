import { sha256 } from '@noble/hashes/sha2.js';
import { bytesToHex, utf8ToBytes } from '@noble/hashes/utils.js';
import { withRates } from '#sim-core/belief/rates-of-run.ts';
import type { ReplicateOutcome } from '#sim-core/ensemble/replicate.ts';
import { cannotClose } from '#sim-core/measure/closing.ts';
import { engineVersion } from '#sim-core/run/engine-version.ts';
import type { RunSpec } from '#sim-core/spec/run-spec.ts';
import type { StudyRun } from '#sim-core/spec/study-run.ts';
import type { DrawnRates } from '#sim-core/spec/uncertain.ts';

/** The run of a spec with these rates, of which none is drawn any more. */
export const specAtRates = (base: RunSpec, replicate: number, rates: DrawnRates): RunSpec => ({
  ...base,
  ...withRates(base, rates),
  replicate,
  uncertain: undefined,
});

/**
 * Names the runs of one spec: the same for whatever study asks for the same run, another for another engine. The key is
 * the SHA-256 of everything that decides the run, with the rates that it comes to.
 */
export function studyKeys(base: RunSpec): (replicate: number, rates: DrawnRates) => string {
  const ofRun = { uncertain: undefined, rates: undefined, processes: undefined, replicate: undefined };
  const ofCommon = hash(canonical({ ...base, ...ofRun }));
  return (replicate, values) => {
    const { rates, processes } = withRates(base, values);
    return hash(`${engineVersion} ${ofCommon} ${canonical({ replicate, rates, processes })}`);
  };
}

const hash = (text: string) => bytesToHex(sha256(utf8ToBytes(text)));

/** JSON whose fields stand in the order of their names, whoever wrote them. */
const canonical = (value: unknown): string =>
  JSON.stringify(value, (_, found: unknown) =>
    typeof found === 'object' && found !== null && !Array.isArray(found)
      ? Object.fromEntries(Object.entries(found).sort(([a], [b]) => (a < b ? -1 : 1)))
      : found,
  );

/** What is kept of a run. @param outcome of a run that kept its closing years; @param rates that the study set */
export function recordStudyRun(
  { result, closing }: ReplicateOutcome,
  { replicate, surveyYear, years, stepsPerYear }: RunSpec,
  rates: DrawnRates,
): StudyRun {
  const closedBy = new Float64Array(years + 1);
  let ground = 0;
  for (const year of closing!) {
    if (year === cannotClose) continue;
    ground++;
    if (year > 0) closedBy[Math.max(0, Math.min(years, year - surveyYear))]++;
  }
  let closed = 0;
  return {
    replicate,
    rates,
    digest: result.digest,
    recoveredYear: result.recoveredYear,
    coveredArea: Array.from({ length: years + 1 }, (_, i) => result.series[i * stepsPerYear].coveredArea),
    closedShare: Array.from(closedBy, (count) => {
      closed += count;
      return ground === 0 ? 0 : Number((closed / ground).toFixed(6));
    }),
  };
}
