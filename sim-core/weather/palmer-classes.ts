/**
 * Classes of the Palmer drought index (Palmer 1965, US Weather Bureau Research Paper 45; the inner bounds from memory),
 * from the driest; `below` is where the next wetter one begins.
 */
export const palmerClasses = [
  { name: 'extreme drought', below: -4 },
  { name: 'severe drought', below: -3 },
  { name: 'moderate drought', below: -2 },
  { name: 'mild drought', below: -1 },
  { name: 'incipient dry spell', below: -0.5 },
  { name: 'near normal', below: 0.5 },
  { name: 'incipient wet spell', below: 1 },
  { name: 'slightly wet', below: 2 },
  { name: 'moderately wet', below: 3 },
  { name: 'very wet', below: 4 },
  { name: 'extremely wet', below: Infinity },
] as const;

/** The class of an index. A bound belongs to the class that is further from normal: −2 is moderate, 2 moderately wet. */
export function palmerClass(index: number): string {
  const found = palmerClasses.find(({ below }) => (below <= -0.5 ? index <= below : index < below));
  return (found ?? palmerClasses[palmerClasses.length - 1]).name;
}
