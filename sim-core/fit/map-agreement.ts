/** What a surveyed map says of a cell. */
export const bare = 0;
export const standing = 1;
/** the survey says nothing there, or the ground cannot hold the plant */
export const unknown = 255;

/** How the cells of two maps of standing plants fall together. */
export interface Agreement {
  /** standing in both */
  readonly hits: number;
  /** standing in the survey alone */
  readonly misses: number;
  /** standing in the simulation alone */
  readonly falseAlarms: number;
  /** bare in both */
  readonly bareInBoth: number;
}

/**
 * Counts cell by cell where the survey says anything.
 *
 * @param surveyed row-major, `bare`, `standing` or `unknown`
 * @param simulated row-major, not 0 where plants stand
 */
export function agreementOf(surveyed: Uint8Array, simulated: ArrayLike<number>): Agreement {
  let hits = 0;
  let misses = 0;
  let falseAlarms = 0;
  let bareInBoth = 0;
  for (let i = 0; i < surveyed.length; i++) {
    if (surveyed[i] === unknown) continue;
    if (surveyed[i] === standing) {
      if (simulated[i]) hits++;
      else misses++;
    } else if (simulated[i]) falseAlarms++;
    else bareInBoth++;
  }
  return { hits, misses, falseAlarms, bareInBoth };
}

/** How good an agreement is, beside what chance would give. Undefined where a measure says nothing. */
export interface AgreementMeasures {
  /** share of cells on which both agree */
  readonly agreement: number;
  /** share that maps of these amounts would agree on by chance */
  readonly byChance: number;
  /** Cohen's κ */
  readonly kappa: number | undefined;
  /** its parts: how well places fit given the amounts, and how well the amounts fit; κ is their product */
  readonly kappaOfPlace: number | undefined;
  readonly kappaOfAmount: number | undefined;
  /** share of cells that differ because the amounts do, and because the places do */
  readonly amountDisagreement: number;
  readonly placeDisagreement: number;
  /** hits among all cells where either has plants (Gilbert 1884; also called threat score) */
  readonly criticalSuccess: number | undefined;
}

/**
 * κ after Cohen (1960, Educ. Psychol. Meas. 20:37–46); its parts after Pontius (2000, Photogramm. Eng. Remote Sens.
 * 66:1011, from memory) and Hagen (2002, 5th AGILE conference, from memory); amount (quantity) and place (allocation)
 * disagreement after Pontius & Millones (2011, Int. J. Remote Sens. 32:4407–4429).
 *
 * @throws RangeError where no cell was compared
 */
export function agreementMeasures({ hits, misses, falseAlarms, bareInBoth }: Agreement): AgreementMeasures {
  const cells = hits + misses + falseAlarms + bareInBoth;
  if (cells === 0)
    throw new RangeError(
      'No cell to compare: the survey says nothing anywhere on ground that holds the plant',
    );
  const surveyed = (hits + misses) / cells;
  const simulated = (hits + falseAlarms) / cells;
  const agreement = (hits + bareInBoth) / cells;
  const byChance = surveyed * simulated + (1 - surveyed) * (1 - simulated);
  const atBest = Math.min(surveyed, simulated) + Math.min(1 - surveyed, 1 - simulated);
  const ratio = (top: number, bottom: number) => (bottom > 0 ? top / bottom : undefined);
  const either = hits + misses + falseAlarms;
  return {
    agreement,
    byChance,
    kappa: ratio(agreement - byChance, 1 - byChance),
    kappaOfPlace: ratio(agreement - byChance, atBest - byChance),
    kappaOfAmount: ratio(atBest - byChance, 1 - byChance),
    amountDisagreement: Math.abs(surveyed - simulated),
    placeDisagreement: (2 * Math.min(misses, falseAlarms)) / cells,
    criticalSuccess: ratio(hits, either),
  };
}

/** Cells that changed between two surveys, against the change that was simulated from the first one. */
export interface ChangeAgreement {
  /** changed in both, to the same */
  readonly hits: number;
  /** changed in the survey, kept in the simulation */
  readonly misses: number;
  /** kept in the survey, changed in the simulation */
  readonly falseAlarms: number;
  /** hits among all cells that changed in either; undefined where none did */
  readonly figureOfMerit: number | undefined;
}

/**
 * Figure of merit of simulated change (Pontius et al. 2008, Ann. Reg. Sci. 42:11–37): what merely stays adds nothing to
 * it, so a simulation is not praised for what would be right without one.
 *
 * @param before first survey, `bare`, `standing` or `unknown`; @param after second survey, likewise
 * @param simulated of the time of the second, not 0 where plants stand
 */
export function changeAgreement(
  before: Uint8Array,
  after: Uint8Array,
  simulated: ArrayLike<number>,
): ChangeAgreement {
  let hits = 0;
  let misses = 0;
  let falseAlarms = 0;
  for (let i = 0; i < before.length; i++) {
    if (before[i] === unknown || after[i] === unknown) continue;
    const changed = before[i] !== after[i];
    const simulatedChange = (before[i] === standing) !== Boolean(simulated[i]);
    if (changed && simulatedChange) hits++;
    else if (changed) misses++;
    else if (simulatedChange) falseAlarms++;
  }
  const either = hits + misses + falseAlarms;
  return { hits, misses, falseAlarms, figureOfMerit: either > 0 ? hits / either : undefined };
}
