import { withoutPlanted } from '#contract/work-titles.ts';
import type { Work } from '#contract/works.ts';
import { WordButton } from '#app/components/word-button.tsx';
import type { Span } from './board/area-pen.ts';
import { EditedBlank } from './edited-blank.tsx';
import { fieldText, withField, type WorkField } from './work-fields.ts';
import { placeInWords, placeOf, worksInWords } from '#contract/works-words.ts';

/** A blank of the sentence that says what the works are, with the words around it. */
interface Piece {
  readonly field: WorkField;
  readonly label: string;
  readonly before?: string;
  readonly after?: string;
}
const inYear: Piece = { field: 'year', label: 'Year', before: 'in' };
const onMounds: Piece = {
  field: 'each',
  label: 'Clumps set on a mound',
  before: 'with',
  after: 'clumps set on it',
};
const pieces: Record<Work['kind'], readonly Piece[]> = {
  mound: [
    { field: 'radius', label: 'Radius, m', after: 'm in radius,' },
    { field: 'strength', label: 'Strength, per cent of full', before: 'at', after: '% of full strength,' },
    { field: 'halo', label: 'Width of the fading edge, m', before: 'fading over', after: 'm,' },
    inYear,
  ],
  planting: [
    { field: 'cover', label: 'Cover that is planted, per cent', before: 'to', after: '% cover,' },
    inYear,
  ],
  clumps: [{ field: 'each', label: 'Clumps at every point', after: 'at every point,' }, inYear],
  fence: [
    { field: 'strength', label: 'Grazing kept out, per cent', before: 'keeps out', after: '% of grazing,' },
    { field: 'year', label: 'First year', before: 'from' },
    { field: 'until', label: 'Last year; empty for the end', before: 'to' },
  ],
  loss: [
    { field: 'share', label: 'Share of the cover lost, per cent', after: '% of the cover lost,' },
    inYear,
  ],
};

/** What is selected, as blanks that change all of it at once. */
export function SelectionForm(props: {
  works: readonly Work[];
  /** what the first of them is called */
  title: string;
  span: Span;
  /** some of it stands on marsh already */
  standing: boolean;
  /** absent for those who only read */
  edit?: {
    /** why the works cannot be taken, or undefined when they were */
    onChange: (works: readonly Work[]) => string | undefined;
    onCopy: () => void;
    onRemove: () => void;
    /** lays the set that it belongs to anew; undefined where no pattern laid it */
    onLay: (() => void) | undefined;
  };
}) {
  const { works, edit, span } = props;
  // Clumps on a mound count as part of it.
  const things = withoutPlanted(works);
  const [first] = things;
  const alone = things.length === 1;
  const kind = things.every((work) => work.kind === first.kind) ? first.kind : undefined;
  const sentence = kind
    ? [
        ...pieces[kind],
        ...(kind === 'mound' && works.some((work) => work.kind === 'clumps') ? [onMounds] : []),
      ]
    : [inYear];
  const take = (field: WorkField) => (text: string) => {
    const changed = works.map((work) => withField(work, field, text, span));
    const wrong = changed.find((work) => typeof work === 'string');
    return typeof wrong === 'string' ? wrong : edit?.onChange(changed as Work[]);
  };
  const blank = ({ field, label }: Piece) => {
    const texts = new Set(works.map((work) => fieldText(work, field)).filter((text) => text !== undefined));
    const same = texts.size === 1;
    const [value = ''] = same ? texts : [];
    if (!edit) return <b className="font-semibold">{same ? value || 'the end' : 'several'}</b>;
    return (
      <EditedBlank
        key={`${works
          .map((work) => work.id)
          .join()
          .slice(0, 200)}/${field}/${value}/${same}`}
        label={same ? label : `${label}: several, one for all`}
        value={value}
        placeholder={same ? (field === 'until' ? 'the end' : undefined) : 'several'}
        characters={same && value !== '' ? undefined : 7}
        onTake={take(field)}
      />
    );
  };
  return (
    <section aria-label="What is selected" className="mb-3 border-b border-rule pb-2 text-[13.5px]">
      <div className="flex flex-wrap items-baseline justify-between gap-x-4">
        <h2 className="text-body leading-tight font-bold">
          {alone ? props.title : `${things.length} selected`}
        </h2>
        {edit && (
          <p className="flex gap-x-4">
            <WordButton lined onClick={edit.onCopy}>
              Copy
            </WordButton>
            <WordButton lined onClick={edit.onRemove}>
              Remove
            </WordButton>
          </p>
        )}
      </div>
      {!alone && <p className="text-note text-ink-2">{worksInWords(works)}</p>}
      <p className="mt-0.5 flex flex-wrap items-baseline gap-x-1.5 gap-y-1">
        {sentence.map((piece) => (
          <span key={piece.field} className="inline-flex flex-wrap items-baseline gap-x-1.5">
            {piece.before} {blank(piece)} {piece.after}
          </span>
        ))}
      </p>
      {alone && edit && (
        <p className="mt-1 flex flex-wrap items-baseline gap-x-1.5">
          called
          <EditedBlank
            key={`${first.id}/name/${first.name ?? ''}`}
            label="Name"
            words
            characters={16}
            placeholder="no name"
            value={first.name ?? ''}
            onTake={(text) => {
              const named = withField(first, 'name', text, span);
              return typeof named === 'string' ? named : edit.onChange([named]);
            }}
          />
        </p>
      )}
      {alone && <p className="font-mono text-axis text-ink-2">{placeInWords(placeOf(first))}</p>}
      {props.standing && (
        <p className="text-note text-ink-2">
          {alone ? 'Stands' : 'Some of it stands'} on marsh already: the plant was there at the survey.
        </p>
      )}
      {edit?.onLay && (
        <p className="mt-0.5">
          <WordButton lined onClick={edit.onLay}>
            Lay the pattern anew
          </WordButton>
        </p>
      )}
    </section>
  );
}
