import { SaveBar } from '#app/components/save-bar.tsx';
import type { ElevationDrafting } from '#app/features/elevation/use-elevation-draft.ts';
import type { ClassDraft } from '#app/features/layers/use-class-draft.ts';
import { formatCounted } from '#app/lib/formats.ts';

/** Saves what was changed of the class table and the curves of elevation. */
export function GroundSaveBar({ classes, elevation }: { classes: ClassDraft; elevation: ElevationDrafting }) {
  const table = classes.dirty || (classes.suggested && !elevation.dirty);
  const label =
    table && elevation.dirty ? 'Save classes and curves' : table ? 'Save the class table' : 'Save the curves';
  const words =
    table && classes.wrong > 0
      ? `${formatCounted(classes.wrong, 'class', 'classes')} to mend first.`
      : (elevation.wrong ??
        (classes.dirty || elevation.dirty ? 'Changed and not saved.' : 'Suggested; not saved yet.'));
  return (
    <SaveBar
      label={label}
      dirty={classes.dirty || elevation.dirty}
      busy={classes.saving || elevation.saving}
      words={words}
      onSave={() => {
        if (table) classes.save();
        if (elevation.dirty) elevation.save();
      }}
      onRevert={() => {
        classes.revert();
        elevation.revert();
      }}
    />
  );
}
