import { useState, type ReactNode } from 'react';
import type { Block } from '#contract/blocks.ts';
import { WordButton } from '#app/components/word-button.tsx';
import { Table } from '#app/components/table.tsx';

/** The technical annex as it prints; folded up until somebody wants it, as it is many times as long as the page. */
export function AnnexView(props: { blocks: readonly Block[]; curves: (outlook: number) => ReactNode }) {
  const [open, setOpen] = useState(false);
  return (
    <article
      aria-label="Technical annex"
      className="printed-paper mx-auto mt-4 w-full max-w-[820px] border border-rule px-4 py-6 text-[13.5px] leading-snug sm:px-10 sm:py-9"
    >
      <div className="flex flex-wrap items-baseline justify-between gap-x-4">
        <h2 className="text-[22px] font-bold">Technical annex</h2>
        <WordButton lined aria-expanded={open} onClick={() => setOpen(!open)}>
          {open ? 'Fold it up' : 'Read it here'}
        </WordButton>
      </div>
      {open ? (
        props.blocks.map((block, i) => <AnnexBlock key={i} block={block} curves={props.curves} />)
      ) : (
        <p className="text-ink-2">
          Results in full, what was run by the headings of the ODD protocol, checks and warnings, layers and
          digests. It prints behind the page.
        </p>
      )}
    </article>
  );
}

function AnnexBlock({ block, curves }: { block: Block; curves: (outlook: number) => ReactNode }) {
  switch (block.kind) {
    case 'heading':
      return block.level === 1 ? (
        <h3 className="mt-5 mb-1 border-t border-ink pt-2 text-[18px] font-bold">{block.text}</h3>
      ) : (
        <h4 className="mt-4 mb-1 text-[15px] font-bold">{block.text}</h4>
      );
    case 'text':
      return <p className="my-1.5 max-w-[78ch]">{block.text}</p>;
    case 'list':
      return (
        <ul className="my-1.5">
          {block.items.map((item, i) => (
            <li
              key={i}
              className="relative my-0.5 max-w-[78ch] pl-4 before:absolute before:left-0 before:content-['–']"
            >
              {item}
            </li>
          ))}
        </ul>
      );
    case 'table':
      return (
        <div className="my-3 overflow-x-auto" tabIndex={0} role="region" aria-label={block.caption}>
          <Table
            caption={block.caption}
            showCaption
            rows={block.rows.map((cells, i) => ({ cells, i }))}
            rowKey={({ i }) => String(i)}
            columns={block.head.map((head, c) => ({
              key: String(c),
              head,
              number: block.numbers.includes(c),
              cell: ({ cells }: { cells: string[] }) =>
                block.signs.includes(c) ? (
                  <span className="font-mono text-[11px] break-all">{cells[c]}</span>
                ) : (
                  cells[c]
                ),
            }))}
          />
        </div>
      );
    case 'curves':
      return <div className="my-3">{curves(block.outlook)}</div>;
  }
}
