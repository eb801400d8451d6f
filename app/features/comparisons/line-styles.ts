/** How the lines of options are told apart without colour: dashes and marks by place, Wait plain and thin. */
const dashes = [undefined, '7 3', '2 3', '9 3 2 3', '12 4', '4 4', '1 4', '14 3 2 3 2 3'];
export const dashOf = (place: number): string | undefined => dashes[place % dashes.length];
export const widthOf = (wait: boolean): number => (wait ? 1.4 : 2.2);

/** Outlines of marks around a point: ring, square, triangle, diamond, upside-down triangle, cross, bar, hourglass. */
const marks = [
  'm-3.5 0a3.5 3.5 0 1 0 7 0a3.5 3.5 0 1 0-7 0z',
  'm-3.2-3.200h6.400v6.400h-6.400z',
  'm0-4.200l4 7h-8z',
  'm0-4.600l4 4.600l-4 4.600l-4-4.600z',
  'm0 4.200l4-7h-8z',
  'm-1.2-4h2.400v2.800h2.800v2.400h-2.800v2.800h-2.400v-2.800h-2.800v-2.400h2.800z',
  'm-1.6-4.200h3.200v8.400h-3.200z',
  'm-3.6-3.800h7.200l-7.2 7.600h7.200z',
];
/** A path of the mark of the option at this place, around each of these points. */
export const marksAt = (place: number, points: readonly (readonly [number, number])[]): string =>
  points.map(([x, y]) => `M${x.toFixed(1)} ${y.toFixed(1)}${marks[place % marks.length]}`).join('');
