import type { ReactNode } from 'react';
import { Notice } from '#app/components/notice.tsx';
import { LoadingLines } from '#app/components/loading-lines.tsx';
import { FieldNumbers } from '#app/features/plant/field-numbers.tsx';
import type { FieldNumbersDraft } from '#app/features/plant/field-numbers-draft.ts';
import { FillCurve } from '#app/features/plant/fill-curve.tsx';
import { FrontPolar } from '#app/features/plant/front-polar.tsx';
import type { ImpliedDraws } from '#app/features/plant/implied-draws.ts';
import type { Implications } from '#app/features/plant/implied.ts';
import { KernelBars } from '#app/features/plant/kernel-bars.tsx';
import { LossCurves } from '#app/features/plant/loss-curves.tsx';
import { formatCounted, formatNumber, formatShare } from '#app/lib/formats.ts';
import type { Rates } from '#sim-core/spec/parameters.ts';
import { useSite } from './use-site.ts';

/** What the rates imply on the cells of this site, drawn and in words. */
export function PlantMargin(props: {
  implied: Implications;
  /** the same over draws of what is believed; undefined before they are there */
  drawn: ImpliedDraws | undefined;
  uncertain: boolean;
  /** blanks that make no sense now: the pictures stand for what they said before */
  wrong: number;
  rates: Rates;
  /** processes that are on: none of the pictures knows of them */
  grazing: boolean;
  fragments: boolean;
  fieldNumbers: FieldNumbersDraft;
  editable: boolean;
  onFieldNumbers: (draft: FieldNumbersDraft) => void;
}) {
  const { implied, rates, drawn, uncertain } = props;
  const { site } = useSite();
  const { cellSize } = site.grid;
  const { kernel } = implied;
  return (
    <div>
      <h2 className="text-lead">What they imply</h2>
      <p className="mb-2.5 text-note text-ink-2">
        on cells of {formatNumber(cellSize)} m, {formatCounted(site.outlook.stepsPerYear, 'step')} a year
      </p>
      {props.wrong > 0 && (
        <Notice className="mb-2" title="Out of date.">
          {formatCounted(props.wrong, 'blank')} cannot be read. These pictures show the values that made sense
          last.
        </Notice>
      )}
      <LeftOut {...props} />
      <Part title="A straight edge moves">
        {kernel === undefined ? (
          <Notice kind="problem" title="No front.">
            {implied.problems.map(({ message }) => `${message}.`).join(' ')}
          </Notice>
        ) : (
          <>
            {drawn?.speeds ? (
              <FrontPolar speeds={drawn.speeds} uncertain={uncertain} />
            ) : (
              <LoadingLines label="Drawing the front" lines={2} />
            )}
            {drawn && drawn.refused > 0 && (
              <Notice className="mt-2" title="Some draws cannot be run here.">
                {formatShare(drawn.refused / drawn.draws)} of what is believed comes to rates that no kernel
                can show on these cells; a comparison with them would be refused. Narrow what is believed of
                lateral spread, fill-in rate or carry-over.
              </Notice>
            )}
            {kernel.warnings.length > 0 ? (
              <Notice className="mt-2" title="The cell is coarse.">
                {kernel.warnings.join(' ')}
              </Notice>
            ) : (
              <p className="mt-1 text-note text-ink-2">
                {formatShare(kernel.diagonalFrontSpeed / kernel.frontSpeed)} of the speed on the diagonal: the
                cells do not show. It crosses 10 m in{' '}
                {formatCounted(Math.round(10 / kernel.frontSpeed), 'year')}.
              </p>
            )}
          </>
        )}
      </Part>
      {kernel !== undefined && (
        <>
          <Part title="Where new clumps land">
            <KernelBars kernel={kernel} cellSize={cellSize} />
          </Part>
          <Part title="Ground fills in">
            <FillCurve {...implied} band={uncertain ? drawn?.fill : undefined} />
          </Part>
        </>
      )}
      <Part title="Against what was measured here">
        <FieldNumbers
          draft={props.fieldNumbers}
          implied={drawn}
          editable={props.editable}
          onChange={props.onFieldNumbers}
        />
      </Part>
      <Part title="What drought takes in a year">
        <LossCurves
          rates={rates}
          halfLoss={implied.halfLoss}
          bands={uncertain ? drawn?.halfLoss : undefined}
        />
      </Part>
    </div>
  );
}

/** What is turned on and yet changes nothing here, so that nobody reads it into the pictures. */
function LeftOut({ grazing, fragments }: { grazing: boolean; fragments: boolean }) {
  const words = [
    grazing &&
      'Grazing is on and left out below: it hangs on how many grazers gather where, which only a run works out. What they come to in a year stands below their rates.',
    fragments && 'Fragments are on and left out below: they jump ahead of the edge by chance.',
  ].filter((line) => line !== false);
  return (
    <div role="status">
      {words.map((line) => (
        <p key={line} className="mb-2.5 border-l-[5px] border-rule pl-2.5 text-note">
          {line}
        </p>
      ))}
    </div>
  );
}

function Part(props: { title: string; children: ReactNode }) {
  return (
    <section className="border-t border-rule pt-1.5 pb-3.5">
      <h3 className="mb-1 text-note font-semibold">{props.title}</h3>
      {props.children}
    </section>
  );
}
