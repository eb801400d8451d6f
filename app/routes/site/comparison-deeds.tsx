import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useState, type ReactNode } from 'react';
import type { Comparison } from '#contract/comparisons.ts';
import { ConfirmDialog } from '#app/components/confirm-dialog.tsx';
import { Menu, MenuItem, MenuRule } from '#app/components/menu.tsx';
import { NameDialog } from '#app/components/name-dialog.tsx';
import { sayDone } from '#app/components/toast.tsx';
import { discardComparison, nameComparison } from '#app/features/comparisons/change-comparison.ts';
import { dropComparison, keepComparison } from '#app/features/comparisons/get-comparison.ts';
import { formatCounted } from '#app/lib/formats.ts';
import { useSite } from './use-site.ts';

/** What can be done with a comparison besides running it, in a menu that opens from `trigger`. */
export function ComparisonDeeds(props: {
  comparison: Pick<Comparison, 'id' | 'siteId' | 'name' | 'decision' | 'done'>;
  trigger: ReactNode;
  /** futures are being run in this tab, so it cannot be deleted now */
  working: boolean;
  onDeleted: () => void;
  /** further entries, above the others */
  children?: ReactNode;
}) {
  const { comparison, working } = props;
  const { mayDraw, role } = useSite();
  const queryClient = useQueryClient();
  const [asked, setAsked] = useState<'rename' | 'delete'>();
  const rename = useMutation({
    mutationFn: (name: string) => nameComparison(comparison, name),
    onSuccess: (saved) => {
      keepComparison(queryClient, saved);
      close();
      sayDone(`Renamed to ${saved.name}`);
    },
  });
  const remove = useMutation({
    mutationFn: () => discardComparison(comparison),
    onSuccess: () => {
      close();
      sayDone(`Deleted ${comparison.name}`);
      props.onDeleted();
      dropComparison(queryClient, comparison);
    },
  });
  const close = () => {
    setAsked(undefined);
    rename.reset();
    remove.reset();
  };
  const decided = comparison.decision !== null;
  const mayRename = decided ? role === 'manager' || role === 'admin' : mayDraw;
  if (!mayDraw && !props.children) return null;
  return (
    <>
      <Menu trigger={props.trigger}>
        {props.children}
        {props.children && mayDraw && <MenuRule />}
        {mayDraw && (
          <MenuItem disabled={!mayRename} onSelect={() => setAsked('rename')}>
            {mayRename ? 'Rename' : 'Rename (decided: managers and admins)'}
          </MenuItem>
        )}
        {mayDraw && (
          <MenuItem disabled={decided || working} onSelect={() => setAsked('delete')}>
            {decided ? 'Delete (decided: it stays)' : working ? 'Delete (pause it first)' : 'Delete'}
          </MenuItem>
        )}
      </Menu>
      {asked === 'rename' && (
        <NameDialog
          onClose={close}
          title={`Rename ${comparison.name}`}
          label="Name of the comparison"
          start={comparison.name}
          longest={120}
          action="Rename it"
          busy={rename.isPending}
          error={rename.error}
          onName={(name) => rename.mutate(name)}
        />
      )}
      <ConfirmDialog
        open={asked === 'delete'}
        onOpenChange={(open) => {
          if (!open) close();
        }}
        title={`Delete ${comparison.name}?`}
        description={`${comparison.done === 0 ? 'It' : `It, ${formatCounted(comparison.done, 'future')} of each option`} and its maps go for good. The options, the ground and the runs of the site stay.`}
        action="Delete the comparison"
        keep="Keep it"
        busy={remove.isPending}
        error={remove.error}
        onConfirm={() => remove.mutate()}
      />
    </>
  );
}
