import type { Option } from '#contract/options.ts';
import type { Action } from '#sim-core/spec/run-spec.ts';
import { FlagSymbol, PlantingSymbol, WaitSymbol } from '#app/components/symbols.tsx';
import { classNames } from '#app/lib/class-names.ts';
import { worksInWords } from './works-words.ts';

/** The options of a site; the chosen one carries a bar of ink. */
export function OptionList(props: {
  options: readonly Option[];
  chosen: string;
  /** works of the chosen one as they are drawn now */
  drawn: readonly Action[];
  /** those with a drawing in this tab that is not saved */
  unsaved: (option: Option) => boolean;
  onChoose: (optionId: string) => void;
}) {
  return (
    <ul className="-mx-4 lg:-mr-7 lg:-ml-6">
      {props.options.map((option) => {
        const chosen = option.id === props.chosen;
        const works = chosen ? props.drawn : option.works;
        const words = option.wait ? 'no works: what every option is measured against' : worksInWords(works);
        return (
          <li key={option.id} className="border-t border-rule-2 first:border-rule">
            <button
              type="button"
              aria-current={chosen ? 'true' : undefined}
              onClick={() => props.onChoose(option.id)}
              className={classNames(
                'grid min-h-11 w-full grid-cols-[18px_minmax(0,1fr)] gap-x-2 border-l-[5px] py-1.5 pr-4 pl-[11px] text-left lg:pr-7 lg:pl-[19px]',
                chosen ? 'border-l-ink' : 'border-l-transparent hover:bg-sheet',
              )}
            >
              <span className="pt-px">
                <OptionSymbol works={works} />
              </span>
              <span className="min-w-0">
                <span
                  className={classNames(
                    'block overflow-hidden text-ellipsis',
                    chosen ? 'font-bold' : 'font-semibold',
                  )}
                >
                  {option.name}
                </span>
                <span className="block text-note text-ink-2">
                  {words}
                  {props.unsaved(option) && '; changes not saved'}
                </span>
              </span>
            </button>
          </li>
        );
      })}
    </ul>
  );
}

function OptionSymbol({ works }: { works: readonly Action[] }) {
  if (works.length === 0) return <WaitSymbol />;
  return works.some((work) => work.kind === 'mound') ? <FlagSymbol /> : <PlantingSymbol />;
}
