import type { Comparison } from '#contract/comparisons.ts';
import { Button } from '#app/components/button.tsx';
import { Dialog, DialogActions } from '#app/components/dialog.tsx';
import { sayDone } from '#app/components/toast.tsx';
import { WordButton } from '#app/components/word-button.tsx';
import { decisionText } from '#app/features/comparisons/decision-text.ts';
import { answersCsv, pairsCsv, recoveryCsv } from '#app/features/comparisons/figures-files.ts';
import { saveFile } from '#app/lib/save-file.ts';
import { useCopy } from '#app/lib/use-copy.ts';
import type { ComparisonFigures } from '#sim-core/compare/comparison-figures.ts';

/** The decision as a text to be copied, saved or printed, and the figures behind it as CSV. */
export function ComparisonFiles(props: {
  comparison: Comparison;
  figures: ComparisonFigures;
  siteName: string;
  onClose: () => void;
}) {
  const { comparison, figures } = props;
  const text = decisionText(comparison, figures, props.siteName);
  const { copy, refused } = useCopy(() => sayDone('Copied'));
  const stem = comparison.name.replaceAll(/[^\p{L}\p{N}]+/gu, '-').replaceAll(/^-|-$/g, '') || 'comparison';
  const save = (name: string, content: string, type: string) =>
    saveFile(`${stem}-${name}`, new Blob([content], { type: `${type};charset=utf-8` }));
  return (
    <Dialog
      open
      wide
      title="Text and figures"
      description="As they stand now, under every outlook."
      onOpenChange={(open) => {
        if (!open) props.onClose();
      }}
    >
      <pre
        tabIndex={0}
        aria-label="The comparison as a text"
        className="mt-3 max-h-[46dvh] overflow-y-auto border border-rule p-3 font-sans text-[13.5px] whitespace-pre-wrap"
      >
        {text}
      </pre>
      {refused && (
        <p role="alert" className="mt-2 text-note">
          The browser does not let this page copy. Mark the text above and copy it, or save it.
        </p>
      )}
      <p className="mt-3 flex flex-wrap items-baseline gap-x-5">
        <b>Figures as CSV</b>
        <WordButton lined onClick={() => save('answers.csv', answersCsv(comparison, figures), 'text/csv')}>
          Answers
        </WordButton>
        <WordButton
          lined
          onClick={() => save('recovery.csv', recoveryCsv(comparison.plan, figures), 'text/csv')}
        >
          Recovery curves
        </WordButton>
        <WordButton lined onClick={() => save('pairs.csv', pairsCsv(figures), 'text/csv')}>
          Pairs
        </WordButton>
      </p>
      <DialogActions>
        <Button kind="primary" onClick={() => copy(text)}>
          Copy the text
        </Button>
        <Button onClick={() => save('decision.txt', text, 'text/plain')}>Save it as a file</Button>
        <Button onClick={props.onClose}>Close</Button>
      </DialogActions>
    </Dialog>
  );
}
