/** Classes of Palmer's index, driest first, each with the lowest |index| (dry) or index (wet) that belongs to it. */
export const palmerClasses = [
  'extreme drought',
  'severe drought',
  'moderate drought',
  'mild drought',
  'incipient dry spell',
  'near normal',
  'incipient wet spell',
  'slightly wet',
  'moderately wet',
  'very wet',
  'extremely wet',
] as const;
export type PalmerClass = (typeof palmerClasses)[number];

/**
 * Class of an index: ≤ −4 extreme, ≤ −3 severe, ≤ −2 moderate, ≤ −1 mild, ≤ −0.5 incipient, within ±0.5 near normal,
 * and the mirror image on the wet side (Palmer 1965, US Weather Bureau Research Paper 45; the names from memory).
 */
export function palmerClass(index: number): PalmerClass {
  const size = Math.abs(index);
  const steps = size >= 4 ? 5 : size >= 3 ? 4 : size >= 2 ? 3 : size >= 1 ? 2 : size >= 0.5 ? 1 : 0;
  return palmerClasses[index < 0 ? 5 - steps : 5 + steps];
}
