import { BlankSelect } from '#app/components/blank.tsx';
import { isClumpPattern, type PatternTool } from './board-tools.ts';
import {
  amountChoices,
  type AmountBy,
  type PatternErrors,
  type PatternField,
  type PatternPen,
} from './pattern-pen.ts';
import { NumberBlank } from './sentence.tsx';

interface PatternBlanksProps {
  readonly tool: PatternTool;
  readonly pen: PatternPen;
  readonly errors: PatternErrors;
  /** ISO 4217; undefined where no costs are set */
  readonly currency: string | undefined;
  readonly onChange: (pen: PatternPen) => void;
}

const fieldOf: Record<Exclude<AmountBy, 'fit'>, PatternField> = {
  count: 'count',
  density: 'perHectare',
  budget: 'budget',
  spacing: 'spacing',
};
const lead: Record<PatternTool, string> = {
  scattered: 'Scatter',
  grid: 'Lay a grid with',
  groups: 'Place',
  edge: 'Place along the edge of what stands',
  line: 'Place along a line',
  clumped: 'Plant',
  dispersed: 'Plant',
};

/** How a pattern is laid, as blanks: `Scatter [40] [mounds] at least [28] m apart, where … [the ground is bare], over …` */
export function PatternBlanks(props: PatternBlanksProps) {
  const { tool, pen, errors, onChange } = props;
  const blank = (field: PatternField, label: string) => (
    <NumberBlank
      label={label}
      value={pen[field]}
      error={errors[field]}
      onChange={(text) => onChange({ ...pen, [field]: text })}
    />
  );
  return (
    <>
      <span>{lead[tool]}</span>
      <AmountBlanks {...props} />
      {(tool === 'scattered' || tool === 'dispersed') && (
        <>
          <span>at least</span> {blank('apart', 'Least distance, m')} <span>m apart</span>
        </>
      )}
      {tool === 'grid' && (
        <>
          <span>turned by</span> {blank('angle', 'Turn of the rows, degrees')} <span>°</span>
        </>
      )}
      {(tool === 'groups' || tool === 'clumped') && (
        <>
          <span>in groups of</span> {blank('each', 'Number in a group')}
          <span>within</span> {blank('reach', 'Reach of a group, m')}
          <span>m of their middles, at least</span> {blank('groupsApart', 'Distance of the groups, m')}
          <span>m apart</span>
        </>
      )}
      {tool === 'edge' && (
        <>
          {blank('offset', 'Distance from the edge, m')} <span>m outside it</span>
        </>
      )}
      {tool !== 'line' && (
        <>
          <span>where works are allowed and</span>
          <BlankSelect
            label="Ground that is taken"
            value={pen.ground}
            onChange={(event) => onChange({ ...pen, ground: event.target.value as PatternPen['ground'] })}
          >
            <option value="bare">the ground is bare</option>
            <option value="any">the plant can grow</option>
          </BlankSelect>
          <BlankSelect
            label="Where the pattern lies"
            value={pen.region}
            onChange={(event) => onChange({ ...pen, region: event.target.value as PatternPen['region'] })}
          >
            <option value="site">over the whole site</option>
            <option value="outline">inside an outline</option>
          </BlankSelect>
        </>
      )}
    </>
  );
}

/** `[40] [mounds]`, `[20] [mounds a hectare]`, `[as many mounds as fit]` … */
function AmountBlanks({ tool, pen, errors, currency, onChange }: PatternBlanksProps) {
  const things = isClumpPattern(tool) ? 'clumps' : 'mounds';
  const words: Record<AmountBy, string> = {
    count: things,
    density: `${things} a hectare`,
    budget: `${currency ?? 'of the budget'} of ${things}`,
    spacing: `m from one ${things.slice(0, -1)} to the next`,
    fit: `as many ${things} as fit`,
  };
  const labels: Record<AmountBy, string> = {
    count: `Number of ${things}`,
    density: `Number of ${things} a hectare`,
    budget: `Budget for ${things}`,
    spacing: `Spacing of ${things}, m`,
    fit: '',
  };
  const field = pen.by === 'fit' ? undefined : fieldOf[pen.by];
  return (
    <>
      {field && (
        <NumberBlank
          label={labels[pen.by]}
          value={pen[field]}
          error={errors[field]}
          onChange={(text) => onChange({ ...pen, [field]: text })}
        />
      )}
      <BlankSelect
        label="What the number means"
        value={pen.by}
        onChange={(event) => onChange({ ...pen, by: event.target.value as AmountBy })}
      >
        {amountChoices[tool].map((by) => (
          <option key={by} value={by} disabled={by === 'budget' && currency === undefined}>
            {words[by]}
          </option>
        ))}
      </BlankSelect>
    </>
  );
}
