import { useState } from 'react';
import type { Site } from '#contract/sites.ts';
import { ConfirmDialog } from '#app/components/confirm-dialog.tsx';
import { NameDialog } from '#app/components/name-dialog.tsx';
import { WordButton } from '#app/components/word-button.tsx';
import { WordChoice } from '#app/components/word-choice.tsx';
import { mainKey, type OutlookKey } from './change-outlook.ts';

type Asking = 'name' | 'copy' | 'delete' | undefined;

/** Which outlook of the site the page shows, and what can be done with it as a whole. */
export function OutlookChoice(props: {
  site: Pick<Site, 'outlook' | 'otherOutlooks'>;
  shown: OutlookKey;
  /** as it is edited */
  name: string;
  onShow: (key: OutlookKey) => void;
  editable: boolean;
  /** another outlook cannot be shown, copied or chosen while this one is not saved */
  dirty: boolean;
  busy: boolean;
  error: unknown;
  onRename: (name: string) => void;
  onCopy: (name: string, done: () => void) => void;
  onMakeMain: () => void;
  onDelete: (done: () => void) => void;
}) {
  const { site, shown, editable, dirty, busy } = props;
  const [asking, ask] = useState<Asking>();
  const main = shown === mainKey;
  const close = () => ask(undefined);
  const several = site.otherOutlooks.length > 0;
  return (
    <div className="flex flex-wrap items-center gap-x-5 gap-y-1">
      {several && (
        <WordChoice
          label="Outlook"
          showLabel
          options={[
            {
              key: mainKey,
              label: `${main ? props.name : site.outlook.name} (main)`,
              disabled: dirty && !main,
            },
            ...site.otherOutlooks.map(({ id, name }) => ({
              key: id,
              label: id === shown ? props.name : name,
              disabled: dirty && id !== shown,
            })),
          ]}
          value={shown}
          onChange={props.onShow}
        />
      )}
      {!several && <span className="text-[13.5px] font-semibold">{props.name}</span>}
      {editable && (
        <span className="flex flex-wrap gap-x-4">
          <WordButton lined onClick={() => ask('name')}>
            Rename
          </WordButton>
          <WordButton lined disabled={dirty} onClick={() => ask('copy')}>
            Add another
          </WordButton>
          {!main && (
            <WordButton lined disabled={dirty} busy={busy} onClick={props.onMakeMain}>
              Make it the main one
            </WordButton>
          )}
          {!main && (
            <WordButton lined disabled={dirty} onClick={() => ask('delete')}>
              Forget it
            </WordButton>
          )}
        </span>
      )}
      {dirty && several && (
        <span className="text-note text-ink-2">Save or take back first to see another.</span>
      )}
      {(asking === 'name' || asking === 'copy') && (
        <NameDialog
          onClose={close}
          title={asking === 'name' ? 'Rename this outlook' : 'Add another outlook'}
          label="Name"
          start={asking === 'name' ? props.name : 'Drier'}
          longest={100}
          action={asking === 'name' ? 'Rename it' : 'Add it'}
          busy={busy}
          error={asking === 'copy' ? props.error : undefined}
          onName={(name) => {
            if (asking === 'copy') props.onCopy(name, close);
            else {
              props.onRename(name);
              close();
            }
          }}
        />
      )}
      <ConfirmDialog
        open={asking === 'delete'}
        onOpenChange={(open) => {
          if (!open) close();
        }}
        title={`Forget “${props.name}”?`}
        description="Its weather, trend and losses go. Runs and comparisons that were made under it stay as they are."
        action="Forget it"
        keep="Keep it"
        busy={busy}
        error={asking === 'delete' ? props.error : undefined}
        onConfirm={() => props.onDelete(close)}
      />
    </div>
  );
}
