import { Dialog as Radix } from 'radix-ui';
import type { ReactNode } from 'react';
import { classNames } from '#app/lib/class-names.ts';

export const veil = 'fixed inset-0 z-40 bg-water/80 no-print';
export const sheet =
  'fixed top-1/2 left-1/2 z-50 max-h-[calc(100dvh-32px)] w-[min(460px,calc(100vw-32px))] -translate-x-1/2 ' +
  '-translate-y-1/2 overflow-y-auto rounded-edge border-[1.5px] border-l-[6px] border-ink bg-sheet px-5 pt-[18px] pb-4';

/** A sheet over the page. Escape and a press outside close it; focus stays inside and goes back after. */
export function Dialog(props: {
  open: boolean;
  onOpenChange: (open: boolean) => void;
  title: string;
  description?: string;
  children: ReactNode;
  /** for what needs room: a message, a table */
  wide?: boolean;
}) {
  return (
    <Radix.Root open={props.open} onOpenChange={props.onOpenChange}>
      <Radix.Portal>
        <Radix.Overlay className={veil} />
        <Radix.Content
          className={classNames(sheet, props.wide && 'w-[min(760px,calc(100vw-32px))]')}
          {...(props.description === undefined ? { 'aria-describedby': undefined } : {})}
        >
          <Radix.Title className="text-[17px]">{props.title}</Radix.Title>
          {props.description !== undefined && (
            <Radix.Description className="mt-1 text-ink-2">{props.description}</Radix.Description>
          )}
          {props.children}
        </Radix.Content>
      </Radix.Portal>
    </Radix.Root>
  );
}

/** The row of actions at the foot of a dialog. */
export function DialogActions(props: { children: ReactNode }) {
  return <div className="mt-4 flex flex-wrap gap-2.5">{props.children}</div>;
}
