import { useId } from 'react';
import { BlankSelect } from '#app/components/blank.tsx';
import { FlagSymbol, PlantingSymbol } from '#app/components/symbols.tsx';
import { classNames } from '#app/lib/class-names.ts';
import { toolGroups, type BoardTool } from './board-tools.ts';

/** The same tools where there is little room: one of a list. */
export function ToolList(props: { tool: BoardTool; onTool: (tool: BoardTool) => void }) {
  return (
    <BlankSelect
      label="Tool"
      className="text-[15px]"
      value={props.tool}
      onChange={(event) => props.onTool(event.target.value as BoardTool)}
    >
      {toolGroups.map((group) => (
        <optgroup key={group.name} label={group.name}>
          {group.tools.map(({ tool, label }) => (
            <option key={tool} value={tool}>
              {group.symbol ? `${group.name}: ${label}` : label}
            </option>
          ))}
        </optgroup>
      ))}
    </BlankSelect>
  );
}

/** The tools in words, as radio buttons of one choice: arrow keys go from one to the next, letters choose on the map. */
export function ToolChoice(props: { tool: BoardTool; onTool: (tool: BoardTool) => void }) {
  const name = useId();
  return (
    <div role="radiogroup" aria-label="Tool" className="contents">
      {toolGroups.map((group, i) => (
        <span
          key={group.name}
          role="group"
          aria-label={group.name}
          className={classNames(
            'flex flex-wrap items-center gap-x-2.5',
            i > 0 && 'sm:border-l sm:border-rule sm:pl-2.5',
          )}
        >
          {group.symbol && (
            <span aria-hidden="true" className="flex items-center gap-1 text-[13.5px] text-ink-2">
              {group.symbol === 'flag' ? <FlagSymbol /> : <PlantingSymbol />} {group.name}
            </span>
          )}
          {group.tools.map(({ tool, label, letter, hint }) => (
            <label
              key={tool}
              title={`${hint}. Key on the map: ${letter.toUpperCase()}`}
              className={classNames(
                'relative inline-flex min-h-7 cursor-pointer items-center border-b-2 px-0.5 text-[13.5px] whitespace-nowrap touch:min-h-11',
                'has-focus-visible:outline-[2.5px] has-focus-visible:outline-offset-2 has-focus-visible:outline-focus',
                tool === props.tool ? 'border-ink font-bold' : 'border-transparent hover:border-rule',
              )}
            >
              <input
                type="radio"
                name={name}
                className="absolute inset-0 cursor-inherit opacity-0"
                aria-label={group.symbol ? `${group.name}: ${label}` : label}
                aria-keyshortcuts={letter.toUpperCase()}
                checked={tool === props.tool}
                onChange={() => props.onTool(tool)}
              />
              {label}
            </label>
          ))}
        </span>
      ))}
    </div>
  );
}
