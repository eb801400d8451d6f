/** Longest horizon and largest grid that a run may ask for. */
export const maximumYears = 500;
export const maximumCells = 16_777_216 * 4;

/** Drought indices that a run takes, Palmer scale; a draw beyond is held there. */
export const driest = -15;
export const wettest = 15;
