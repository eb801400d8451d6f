import type { AreaErrors, AreaField, AreaPen } from './area-pen.ts';
import type { AreaTool } from './board-tools.ts';
import { NumberBlank, Sentence } from './sentence.tsx';

/** What an outline becomes, as blanks in a sentence. */
export function AreaSentence(props: {
  tool: AreaTool;
  pen: AreaPen;
  year: string;
  errors: AreaErrors;
  missed: number;
  onPen: (pen: AreaPen) => void;
  onYear: (year: string) => void;
}) {
  const { tool, pen, errors, onPen } = props;
  const blank = (field: AreaField, label: string) => (
    <NumberBlank
      label={label}
      value={pen[field]}
      error={errors[field]}
      onChange={(text) => onPen({ ...pen, [field]: text })}
    />
  );
  const year = (label: string) => (
    <NumberBlank label={label} value={props.year} error={errors.year} onChange={props.onYear} />
  );
  return (
    <Sentence errors={errors} missed={props.missed}>
      {tool === 'even' && (
        <>
          <span>Plant an outline to</span> {blank('cover', 'Cover that is planted, per cent')}
          <span>% cover all over, in</span> {year('Year of the planting')}
        </>
      )}
      {tool === 'fence' && (
        <>
          <span>Fence an outline that keeps out</span> {blank('strength', 'Grazing kept out, per cent')}
          <span>% of grazing, from</span> {year('First year of the fence')}
          <span>to</span> {blank('until', 'Last year of the fence; empty for the end')}
          <span>{pen.until.trim() === '' ? '(the end, while empty)' : ''}</span>
        </>
      )}
      {tool === 'loss' && (
        <>
          <span>Expect that an outline loses</span> {blank('share', 'Share of the cover lost, per cent')}
          <span>% of its cover in</span> {year('Year of the loss')}
        </>
      )}
    </Sentence>
  );
}
