import { useState, type DragEvent, type KeyboardEvent } from 'react';
import type { Option } from '#contract/options.ts';
import { countsInWords } from '#contract/work-changes.ts';
import type { Work } from '#contract/works.ts';
import { classNames } from '#app/lib/class-names.ts';
import { CostBar } from './cost-bar.tsx';
import type { OptionCost } from './option-costs.ts';
import { OptionPicture, type PictureBase } from './option-picture.tsx';

export interface OptionGridProps {
  /** those that are not archived, Wait first */
  options: readonly Option[];
  chosen: string;
  /** works of the chosen one as they are drawn now */
  drawn: readonly Work[];
  base: PictureBase;
  /** undefined while nobody has set costs */
  costOf: ((works: readonly Work[]) => OptionCost) | undefined;
  /** those with a drawing in this tab that is not saved */
  unsaved: (option: Option) => boolean;
  /** the option that the newest decision on this site chose */
  decided?: string | undefined;
  onChoose: (optionId: string) => void;
  /** moves an option to a place among those beside Wait; absent for those who only read */
  onMove?: (optionId: string, to: number) => void;
}

/** The options as small pictures of the same map, side by side; dragged, or moved by Alt and the arrow keys. */
export function OptionGrid(props: OptionGridProps) {
  const { options, chosen, drawn, base, onMove } = props;
  const [dragged, setDragged] = useState<string>();
  const [over, setOver] = useState<string>();
  const places = options.filter((option) => !option.wait).map(({ id }) => id);
  const all = options.map((option) => (option.id === chosen ? drawn : option.works));
  const costs = props.costOf && all.map(props.costOf);
  const scale = costs && Math.max(1, ...costs.map(({ total, budget }) => Math.max(total, budget ?? 0)));
  const drop = (event: DragEvent, id: string) => {
    event.preventDefault();
    if (dragged !== undefined && dragged !== id) onMove?.(dragged, Math.max(0, places.indexOf(id)));
    setDragged(undefined);
    setOver(undefined);
  };
  return (
    <ul className="grid grid-cols-2 gap-x-3 gap-y-2.5">
      {options.map((option, i) => {
        const { id, wait } = option;
        const movable = onMove !== undefined && !wait;
        return (
          <li
            key={id}
            draggable={movable}
            onDragStart={(event) => {
              event.dataTransfer.effectAllowed = 'move';
              setDragged(id);
            }}
            onDragEnd={() => {
              setDragged(undefined);
              setOver(undefined);
            }}
            onDragOver={(event) => {
              if (dragged === undefined) return;
              event.preventDefault();
              setOver(id);
            }}
            onDrop={(event) => drop(event, id)}
            className={classNames(
              'min-w-0',
              dragged === id && 'opacity-50',
              over === id && dragged !== id && 'outline-[2.5px] outline-offset-2 outline-ink outline-dashed',
            )}
          >
            <OptionEntry
              option={option}
              works={all[i]}
              base={base}
              cost={costs?.[i]}
              scale={scale ?? 1}
              chosen={id === chosen}
              decided={id === props.decided}
              unsaved={props.unsaved(option)}
              onChoose={() => props.onChoose(id)}
              onStep={movable ? (step) => onMove(id, places.indexOf(id) + step) : undefined}
            />
          </li>
        );
      })}
    </ul>
  );
}

const steps: Record<string, number> = { ArrowLeft: -1, ArrowUp: -1, ArrowRight: 1, ArrowDown: 1 };

function OptionEntry(props: {
  option: Option;
  works: readonly Work[];
  base: PictureBase;
  cost: OptionCost | undefined;
  scale: number;
  chosen: boolean;
  decided: boolean;
  unsaved: boolean;
  onChoose: () => void;
  onStep: ((step: number) => void) | undefined;
}) {
  const { option, works, chosen, cost, onStep } = props;
  const words = countsInWords(works).join(', ') || 'no works';
  const step = (event: KeyboardEvent) => {
    if (!event.altKey || !(event.key in steps) || !onStep) return;
    event.preventDefault();
    event.stopPropagation();
    onStep(steps[event.key]);
  };
  return (
    <button
      type="button"
      aria-current={chosen ? 'true' : undefined}
      aria-keyshortcuts={onStep && 'Alt+ArrowLeft Alt+ArrowRight'}
      onClick={props.onChoose}
      onKeyDown={step}
      className="block w-full text-left"
    >
      <OptionPicture
        base={props.base}
        works={works}
        className={chosen ? 'outline-[2.5px] outline-ink' : 'hover:outline-[1.5px] hover:outline-ink-3'}
      />
      <span
        className={classNames(
          'mt-1 block leading-tight wrap-anywhere',
          chosen ? 'font-bold' : 'font-semibold',
        )}
      >
        {option.name}
        {props.decided && (
          <span className="ml-1.5 inline-block border-[1.5px] border-ink px-1 text-note font-semibold">
            decided for
          </span>
        )}
      </span>
      <span className="block text-note leading-snug text-ink-2">
        {words}
        {props.unsaved && '; changes not saved'}
      </span>
      {cost && <CostBar cost={cost} scale={props.scale} />}
    </button>
  );
}
