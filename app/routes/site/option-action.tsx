import { useNavigate } from 'react-router-dom';
import type { Option } from '#contract/options.ts';
import { classNames } from '#app/lib/class-names.ts';
import { Button } from '#app/components/button.tsx';
import { LinkButton } from '#app/components/link-button.tsx';
import { WordButton, WordLink } from '#app/components/word-button.tsx';
import type { OptionDrawing } from '#app/features/options/use-option-drawing.ts';
import { missingGround } from '#app/features/sites/site-steps.ts';
import { useSite } from './use-site.ts';

const missingWords = {
  habitat: 'a habitat layer',
  classes: 'the class table of habitat',
  cover: 'a cover layer',
} as const;

/** What can be done with a drawing: save it, and go on to a run of it once the ground can bear one. */
export function OptionAction(props: {
  option: Option;
  drawing: OptionDrawing;
  /** something is shown that is to be placed first: that is the action that matters now */
  waits: boolean;
}) {
  const { option, drawing, waits } = props;
  const { site } = useSite();
  const navigate = useNavigate();
  const { conflict, saving } = drawing;
  const toSave = drawing.unsaved && !conflict;
  const missing = missingGround(site.layers);
  const complete = missing.length === 0;
  const runAddress = `/sites/${site.id}/runs?start=${option.id}`;
  const saveAndSetUp = async () => {
    if (await drawing.save()) void navigate(runAddress);
  };
  return (
    <>
      {complete && toSave && (
        <Button
          kind={waits ? 'quiet' : 'primary'}
          busy={saving}
          busyLabel="Saving"
          onClick={() => void saveAndSetUp()}
        >
          Save and set up a run
        </Button>
      )}
      {complete && !toSave && (
        <LinkButton kind={conflict || waits ? 'quiet' : 'primary'} to={runAddress}>
          Set up a run
        </LinkButton>
      )}
      {toSave && (
        <>
          <Button busy={saving} onClick={() => void drawing.save()}>
            Save
          </Button>
          <WordButton onClick={() => drawing.draw({ type: 'discard' })}>Discard</WordButton>
        </>
      )}
      {!complete && (
        <p className="w-full text-note">
          A run still needs {missing.map((part) => missingWords[part]).join(' and ')}.{' '}
          <WordLink to={`/sites/${site.id}/ground`}>See Ground</WordLink>
        </p>
      )}
      <p
        role="status"
        className={classNames(
          'text-note lg:w-full',
          drawing.kept ? 'text-ink-2' : 'font-semibold text-danger',
        )}
      >
        {statusWords({ option, drawing, complete })}
      </p>
    </>
  );
}

function statusWords(state: { option: Option; drawing: OptionDrawing; complete: boolean }): string {
  const { option, drawing, complete } = state;
  if (drawing.conflict)
    return complete
      ? 'A run takes what was saved last, not your drawing.'
      : 'Somebody else saved this option; your drawing is kept in this tab.';
  if (drawing.unsaved && !drawing.kept)
    return 'This browser cannot keep so large a drawing: save it before you leave or reload the page.';
  if (drawing.unsaved) return 'Kept in this tab; not saved for the team yet.';
  if (option.wait) return 'Wait is run like any option, so that there is something to compare with.';
  return 'Saved.';
}
