import { wilsonInterval } from '#sim-core/ensemble/proportion.ts';
import { fitted, runTrial } from '#sim-core/fit/testing/fit-trial.ts';

/**
 * Whether fits say how sure they are (`npm run bench -- fit`): true rates are drawn from belief, their resurveys simulated
 * and fitted, and it is counted how often the middle nine tenths hold the truth. Not a matter of time.
 */
const trials = Number(process.env.FIT_TRIALS ?? 100);
const size = { population: 100, priorRuns: 400, mostRuns: 1500 };
const held = fitted.map(() => 0);
const widths = fitted.map(() => 0);
let runs = 0;
for (let trial = 0; trial < trials; trial++) {
  const { truth, intervals, state } = runTrial(`trial ${trial}`, size);
  runs += state.runs;
  truth.forEach((value, i) => {
    const [low, , high] = intervals[i];
    if (value >= low && value <= high) held[i]++;
    widths[i] += (high - low) / trials;
  });
}
fitted.forEach(({ name, belief }, i) => {
  const { low, high } = wilsonInterval(held[i], trials);
  const before = belief.law === 'uniform' ? 0.9 * (belief.high - belief.low) : NaN;
  const line = {
    name: 'fit',
    rate: name,
    nominal: 0.9,
    trials,
    coverage: held[i] / trials,
    low,
    high,
    widthLeft: widths[i] / before,
    runsPerTrial: runs / trials,
  };
  console.log(
    process.argv.includes('--json')
      ? JSON.stringify(line)
      : `fit      ${name.padEnd(14)} nine tenths hold ${held[i]} of ${trials} true rates (95 %: ${low.toFixed(3)} to ${high.toFixed(3)}); width left ${line.widthLeft.toFixed(2)} of belief before`,
  );
});
