/** How the lines of options are told apart without colour: dashes by place, Wait plain and thin. */
const dashes = [undefined, '7 3', '2 3', '9 3 2 3', '12 4', '4 4', '1 4', '14 3 2 3 2 3'];
export const dashOf = (place: number): string | undefined => dashes[place % dashes.length];
export const widthOf = (wait: boolean): number => (wait ? 1.4 : 2.2);
