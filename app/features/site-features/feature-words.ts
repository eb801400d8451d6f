import type { Feature, FeatureKind } from '#contract/features.ts';
import { holesInWords } from '#contract/works-words.ts';
import { formatLength, formatShare } from '#app/lib/formats.ts';

export const kindLabels: Record<FeatureKind, string> = {
  refuge: 'refuge',
  fence: 'fence',
  allowed: 'allowed ground',
};

export const kindMeanings: Record<FeatureKind, string> = {
  refuge: 'Surveyed mounds and the like: they shelter as refuge does, the stronger where both are.',
  fence: 'Fences that stand already: they keep grazers out of their area.',
  allowed: 'Areas where works may go; outside of all of them, and of the allowed layer, they may not.',
};

/** What a feature is called, or which row it was. */
export const featureName = ({ name, kind, row }: { name: string; kind: FeatureKind; row: number }): string =>
  name || `${kindLabels[kind]}, row ${row}`;

/** Shape and strength of a feature. */
export function featureInWords({
  kind,
  shape,
  strength,
  halo,
}: Pick<Feature, 'kind' | 'shape' | 'strength' | 'halo'>) {
  const form =
    shape.shape === 'disc'
      ? `disc of ${formatLength(shape.radius)} radius`
      : `area of ${shape.ring.length} corners${holesInWords(shape)}`;
  if (kind === 'allowed') return form;
  const fading = kind === 'refuge' && halo > 0 ? `, fading over ${formatLength(halo)}` : '';
  return `${form}, strength ${formatShare(strength)}${fading}`;
}
