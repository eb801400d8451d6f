import { Tabs } from 'radix-ui';
import type { ReactNode } from 'react';

export interface WordTab<Key extends string> {
  key: Key;
  label: string;
  content: ReactNode;
}

/** Parts of one page, of which one shows; the tabs are words. Arrow keys move between them. */
export function WordTabs<Key extends string>(props: {
  label: string;
  tabs: readonly WordTab<Key>[];
  value: Key;
  onChange: (key: Key) => void;
}) {
  return (
    <Tabs.Root value={props.value} onValueChange={(key) => props.onChange(key as Key)}>
      <Tabs.List aria-label={props.label} className="flex flex-wrap gap-x-4">
        {props.tabs.map((tab) => (
          <Tabs.Trigger
            key={tab.key}
            value={tab.key}
            className="inline-flex min-h-7 touch:min-h-11 items-center border-b-2 border-transparent px-0.5 text-[13.5px] hover:border-rule data-[state=active]:border-ink data-[state=active]:font-bold"
          >
            {tab.label}
          </Tabs.Trigger>
        ))}
      </Tabs.List>
      {props.tabs.map((tab) => (
        <Tabs.Content key={tab.key} value={tab.key}>
          {tab.content}
        </Tabs.Content>
      ))}
    </Tabs.Root>
  );
}
