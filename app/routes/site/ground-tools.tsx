import type { LayerPart } from '#contract/layers.ts';
import { BlankSelect } from '#app/components/blank.tsx';
import { WordChoice } from '#app/components/word-choice.tsx';
import { partLabels } from '#app/features/layers/part-words.ts';
import { useNarrow } from '#app/lib/use-media-query.ts';
import { engineLabels, engineMaps, readView, viewKey, type GroundView } from './ground-view.ts';

/** What the map shows: a layer as it came, or what the engine will see. */
export function GroundTools(props: {
  present: readonly LayerPart[];
  /** of resurveys */
  years: readonly number[];
  view: GroundView | undefined;
  onShow: (view: GroundView) => void;
}) {
  const { present, years, view, onShow } = props;
  const resurveys = years.map((year) => ({
    view: { of: 'layer', part: 'resurvey', year } as const,
    label: `resurvey ${year}`,
  }));
  const show = (key: string) => {
    const chosen = readView(key, present, years);
    if (chosen) onShow(chosen);
  };
  const narrow = useNarrow();
  if (view === undefined)
    return <span className="flex min-h-8 items-center text-[13.5px] text-ink-2">No layer to show yet</span>;
  if (narrow)
    return (
      <div className="flex items-center gap-x-2 text-[13.5px]">
        <span aria-hidden="true" className="text-ink-2">
          Map shows
        </span>
        <BlankSelect
          label="Map shows"
          className="min-w-0 text-[15px]"
          value={viewKey(view)}
          onChange={(event) => show(event.target.value)}
        >
          <optgroup label="Layers">
            {present.map((part) => (
              <option key={part} value={viewKey({ of: 'layer', part })}>
                {partLabels[part].toLowerCase()}
              </option>
            ))}
            {resurveys.map((resurvey) => (
              <option key={resurvey.label} value={viewKey(resurvey.view)}>
                {resurvey.label}
              </option>
            ))}
          </optgroup>
          <optgroup label="The engine will see">
            {engineMaps.map((map) => (
              <option key={map} value={viewKey({ of: 'engine', map })}>
                {engineLabels[map]}, to the engine
              </option>
            ))}
          </optgroup>
        </BlankSelect>
      </div>
    );
  return (
    <div className="flex min-h-8 flex-wrap items-center gap-x-8">
      <WordChoice
        label="Layers"
        showLabel
        options={[
          ...present.map((part) => ({
            key: viewKey({ of: 'layer', part }),
            label: partLabels[part].toLowerCase(),
          })),
          ...resurveys.map((resurvey) => ({ key: viewKey(resurvey.view), label: resurvey.label })),
        ]}
        value={view.of === 'layer' ? viewKey(view) : undefined}
        onChange={show}
      />
      <WordChoice
        label="The engine will see"
        showLabel
        options={engineMaps.map((key) => ({ key, label: engineLabels[key] }))}
        value={view.of === 'engine' ? view.map : undefined}
        onChange={(map) => onShow({ of: 'engine', map })}
      />
    </div>
  );
}
