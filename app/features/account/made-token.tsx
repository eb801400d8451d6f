import { useId } from 'react';
import { Button } from '#app/components/button.tsx';
import { sayDone } from '#app/components/toast.tsx';
import { useCopy } from '#app/lib/use-copy.ts';

/** A token right after it was made, the one time that it is shown. It stays until its owner says that they have it. */
export function MadeToken(props: { token: string; name: string; onKept: () => void }) {
  const { copy, refused } = useCopy(() => sayDone('Copied'));
  const id = useId();
  return (
    <div className="border-y border-l-[6px] border-y-rule border-l-ink py-2.5 pl-3.5">
      <label htmlFor={id} className="block font-bold">
        The token “{props.name}”
      </label>
      <p id={`${id}-note`} className="text-note text-ink-2">
        It is shown this once. Keep it like a password: whoever has it can do what it may do.
      </p>
      <input
        id={id}
        aria-describedby={`${id}-note`}
        readOnly
        autoFocus
        value={props.token}
        onFocus={(event) => event.currentTarget.select()}
        className="mt-2 h-9 w-full min-w-0 border border-rule bg-sheet px-2.5 font-mono text-[13px] touch:h-11"
      />
      {refused && (
        <p role="alert" className="mt-1 text-note">
          The browser does not let this page copy. Mark the token above and copy it.
        </p>
      )}
      <div className="mt-2.5 flex flex-wrap gap-2.5">
        <Button onClick={() => copy(props.token)}>Copy</Button>
        <Button onClick={props.onKept}>I have it</Button>
      </div>
    </div>
  );
}
