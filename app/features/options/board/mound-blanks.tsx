import type { MoundErrors, MoundPen } from '../mound-pen.ts';
import { NumberBlank } from './sentence.tsx';

/** `[1.5] m in radius, at [100] % of full strength, fading over [1] m, with [9] clumps set on it` */
export function MoundBlanks(props: {
  pen: MoundPen;
  errors: MoundErrors;
  onChange: (pen: MoundPen) => void;
}) {
  const { pen, errors, onChange } = props;
  const blank = (field: keyof MoundPen, label: string) => (
    <NumberBlank
      label={label}
      value={pen[field]}
      error={errors[field]}
      onChange={(text) => onChange({ ...pen, [field]: text })}
    />
  );
  return (
    <>
      {blank('radius', 'Radius of a mound, m')}
      <span>m in radius, at</span> {blank('strength', 'Strength of a mound, per cent of full')}
      <span>% of full strength, fading over</span> {blank('halo', 'Width of the fading edge, m')}
      <span>m, with</span> {blank('clumps', 'Clumps set on a mound')} <span>clumps set on it</span>
    </>
  );
}
