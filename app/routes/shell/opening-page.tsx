import { LoadingLines } from '#app/components/loading-lines.tsx';

/** What shows before the first page is there. */
export function OpeningPage() {
  return (
    <main className="mx-auto max-w-[520px] px-4 pt-16">
      <LoadingLines label="Opening" />
    </main>
  );
}
