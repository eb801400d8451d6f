import type { RasterContent, ResamplingMethod } from './alignment-plan.ts';

/** From here on the grid counts as coarser than the raster; below lies what UTM's scale does to cells of one size. */
const coarser = 1.001;

/** Methods that make sense: class numbers have no mean, and amounts no majority. `copy` is never chosen, it is found. */
export const methodsFor = (content: RasterContent): readonly Exclude<ResamplingMethod, 'copy'>[] =>
  content === 'classes' ? ['nearest', 'majority'] : ['nearest', 'bilinear', 'area-weighted'];

/** The method that keeps classes whole, heights smooth and areas right, by how much wider the grid's cells are. */
export function usualMethod(content: RasterContent, cellRatio: number): Exclude<ResamplingMethod, 'copy'> {
  if (content === 'classes') return cellRatio > coarser ? 'majority' : 'nearest';
  return cellRatio > coarser ? 'area-weighted' : 'bilinear';
}

/** What is lost by a method that is not the usual one, in a sentence, or undefined. */
export function methodCaution(
  content: RasterContent,
  method: ResamplingMethod,
  cellRatio: number,
): string | undefined {
  if (cellRatio <= coarser) {
    if (method === 'nearest' && content === 'amounts')
      return 'The nearest value moves what it shows by up to half a cell and leaves steps.';
    return undefined;
  }
  if (method !== 'nearest' && method !== 'bilinear') return undefined;
  const cells = Math.max(2, Math.round(cellRatio ** 2));
  const taken = method === 'nearest' ? 'one' : 'at most four';
  return `Each cell of the grid lies over about ${cells} of the raster’s, of which this method looks at ${taken}: narrow things get lost, and areas come out wrong.`;
}
