import { DropdownMenu } from 'radix-ui';
import type { ReactNode } from 'react';
import { Link } from 'react-router-dom';

const item =
  'flex min-h-8 touch:min-h-11 cursor-pointer items-center justify-between gap-6 px-3.5 text-body no-underline outline-none ' +
  'data-highlighted:bg-ink data-highlighted:text-sheet data-disabled:text-ink-3';

/** A list of words that opens from `trigger`, which must be a button. It stays in the trigger's own landmark. */
export function Menu(props: { trigger: ReactNode; children: ReactNode; align?: 'start' | 'end' }) {
  return (
    <DropdownMenu.Root modal={false}>
      <DropdownMenu.Trigger asChild>{props.trigger}</DropdownMenu.Trigger>
      <DropdownMenu.Content
        align={props.align ?? 'end'}
        sideOffset={4}
        collisionPadding={8}
        className="z-50 min-w-[200px] rounded-edge border-[1.5px] border-ink bg-sheet py-1.5"
      >
        {props.children}
      </DropdownMenu.Content>
    </DropdownMenu.Root>
  );
}

export function MenuItem(props: { onSelect: () => void; disabled?: boolean; children: ReactNode }) {
  return (
    <DropdownMenu.Item className={item} onSelect={props.onSelect} disabled={props.disabled}>
      {props.children}
    </DropdownMenu.Item>
  );
}

export function MenuLink(props: { to: string; children: ReactNode }) {
  return (
    <DropdownMenu.Item asChild className={item}>
      <Link to={props.to}>{props.children}</Link>
    </DropdownMenu.Item>
  );
}

/** One of a few inside a menu; choosing does not close it, so that the effect can be seen. */
export function MenuChoice<Key extends string>(props: {
  label: string;
  options: readonly { key: Key; label: string }[];
  value: Key;
  onChange: (key: Key) => void;
}) {
  return (
    <>
      <MenuLabel>{props.label}</MenuLabel>
      <DropdownMenu.RadioGroup value={props.value} onValueChange={(key) => props.onChange(key as Key)}>
        {props.options.map((option) => (
          <DropdownMenu.RadioItem
            key={option.key}
            value={option.key}
            onSelect={(event) => event.preventDefault()}
            className={`${item} data-[state=checked]:font-bold`}
          >
            {option.label}
            <DropdownMenu.ItemIndicator aria-hidden="true" className="text-note font-normal">
              chosen
            </DropdownMenu.ItemIndicator>
          </DropdownMenu.RadioItem>
        ))}
      </DropdownMenu.RadioGroup>
    </>
  );
}

export function MenuLabel(props: { children: ReactNode }) {
  return (
    <DropdownMenu.Label className="px-3.5 pt-1 pb-0.5 text-note text-ink-2">
      {props.children}
    </DropdownMenu.Label>
  );
}

export function MenuRule() {
  return <DropdownMenu.Separator className="my-1.5 border-t border-rule" />;
}
