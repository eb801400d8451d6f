import type { Outlook } from '#contract/outlooks.ts';
import type { Site } from '#contract/sites.ts';
import { Blank, BlankSelect } from '#app/components/blank.tsx';

/** The outlook of a run as blanks in its sentence: which one, and whether a future of it is drawn or its years are taken. */
export function RunOutlook(props: {
  site: Pick<Site, 'outlook' | 'otherOutlooks'>;
  outlook: Outlook;
  /** takes the listed years of an outlook that draws its weather */
  listed: boolean;
  /** as typed */
  future: string;
  futureProblem: string | undefined;
  /** @param id of a further outlook; undefined: the main one */
  onOutlook: (id: string | undefined) => void;
  onListed: (listed: boolean) => void;
  onFuture: (text: string) => void;
}) {
  const { site, outlook, listed } = props;
  return (
    <>
      <span>under</span>
      {site.otherOutlooks.length === 0 ? (
        <b>{outlook.name}</b>
      ) : (
        <BlankSelect
          label="Outlook of the run"
          className="max-w-full text-[15px]"
          value={'id' in outlook ? String(outlook.id) : ''}
          onChange={(event) => props.onOutlook(event.target.value || undefined)}
        >
          <option value="">{site.outlook.name}</option>
          {site.otherOutlooks.map(({ id, name }) => (
            <option key={id} value={id}>
              {name}
            </option>
          ))}
        </BlankSelect>
      )}
      {outlook.drawn === null ? (
        <span>(its listed years)</span>
      ) : (
        <>
          <span>in</span>
          <BlankSelect
            label="Weather of the run"
            className="max-w-full text-[15px]"
            value={listed ? 'listed' : 'drawn'}
            onChange={(event) => props.onListed(event.target.value === 'listed')}
          >
            <option value="drawn">a drawn future, number</option>
            <option value="listed">the listed years</option>
          </BlankSelect>
          {!listed && (
            <Blank
              label="Number of the drawn future"
              inputMode="numeric"
              characters={Math.max(4, props.future.length)}
              maxLength={6}
              value={props.future}
              error={props.futureProblem}
              onChange={(event) => props.onFuture(event.target.value)}
            />
          )}
        </>
      )}
    </>
  );
}
