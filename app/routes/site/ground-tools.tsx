import type { LayerPart } from '#contract/layers.ts';
import { WordChoice } from '#app/components/word-choice.tsx';
import { partLabels } from '#app/features/layers/part-words.ts';
import { engineLabels, engineMaps, type GroundView } from './ground-view.ts';

/** What the map shows: a layer as it came, or what the engine will see. */
export function GroundTools(props: {
  present: readonly LayerPart[];
  view: GroundView | undefined;
  onShow: (view: GroundView) => void;
}) {
  const { present, view, onShow } = props;
  if (view === undefined)
    return <span className="flex min-h-8 items-center text-[13.5px] text-ink-2">No layer to show yet</span>;
  return (
    <div className="flex min-h-8 flex-wrap items-center gap-x-8">
      <WordChoice
        label="Layers"
        showLabel
        options={present.map((key) => ({ key, label: partLabels[key].toLowerCase() }))}
        value={view.of === 'layer' ? view.part : undefined}
        onChange={(part) => onShow({ of: 'layer', part })}
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
