/**
 * Number of footholds at the knee of the summed gain: where the curve lies highest above the chord from nothing to all
 * (the rule of Satopää et al. 2011, "Finding a Kneedle in a Haystack", from memory, without its smoothing). Undefined for
 * fewer than three, or where no point lies 5 % of the whole gain above the chord.
 */
export function gainKnee(gains: readonly number[]): number | undefined {
  const total = gains.reduce((sum, gain) => sum + gain, 0);
  if (gains.length < 3 || !(total > 0)) return undefined;
  let [sum, highest, knee] = [0, 0.05, undefined as number | undefined];
  gains.forEach((gain, i) => {
    sum += gain;
    const above = sum / total - (i + 1) / gains.length;
    if (above > highest) [highest, knee] = [above, i + 1];
  });
  return knee;
}
