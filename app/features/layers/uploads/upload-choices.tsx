import { useMutation, useQueryClient } from '@tanstack/react-query';
import type { ReactNode } from 'react';
import {
  layerParts,
  resamplingMethods,
  valueUnits,
  type Layer,
  type LayerPart,
  type ResamplingMethod,
  type ValueUnit,
} from '#contract/layers.ts';
import type { Upload, UploadChoices as Choices } from '#contract/uploads.ts';
import type { Grid } from '#sim-core/grid/grid.ts';
import { BlankSelect } from '#app/components/blank.tsx';
import { Button } from '#app/components/button.tsx';
import { Notice, ProblemNotice } from '#app/components/notice.tsx';
import { WordButton } from '#app/components/word-button.tsx';
import { formatShare } from '#app/lib/formats.ts';
import { HeightBlanks } from '../height-blanks.tsx';
import { Histogram } from '../histogram.tsx';
import { hasUnit, heightUnitLabels, unitLabels } from '../part-words.ts';
import { YearBlank } from '../year-choice.tsx';
import { OutlineFigure } from './outline-figure.tsx';
import { fileInWords, isReady, methodLabels, planInWords } from './plan-words.ts';
import { UploadPicture } from './upload-picture.tsx';
import { Reasons } from './upload-reasons.tsx';
import { keepUpload, uploadDeeds } from './uploads-query.ts';

/** What was found in a file, what is to be decided about it, and what placing it will do. */
export function UploadChoices(props: {
  upload: Upload;
  /** the site's; undefined while there is no site yet */
  grid: Grid | undefined;
  /** what plays its part now */
  layers?: readonly Layer[];
  children?: ReactNode;
}) {
  const { upload, grid } = props;
  const { description, facts, choices, plan, outline } = upload;
  const queryClient = useQueryClient();
  const keep = { onSuccess: (next: Upload) => keepUpload(queryClient, next) };
  const choose = useMutation({
    mutationFn: (change: Partial<Choices>) => uploadDeeds.choose(upload, { ...choices, ...change }),
    ...keep,
  });
  const place = useMutation({ mutationFn: () => uploadDeeds.place(upload), ...keep });
  if (!description || !facts) return null;
  const shown = choose.isPending ? { ...choices, ...choose.variables } : choices;
  const target = plan?.target ?? grid;
  const heightUnit = shown.vertical?.unit ?? upload.heights?.unit ?? 'metre';
  const replaced = props.layers?.find(
    ({ part, year }) => part === shown.part && (part !== 'resurvey' || year === shown.year),
  );
  return (
    <div aria-busy={choose.isPending || undefined}>
      <p className="text-ink-2">{fileInWords(description)}</p>
      <div className="my-2 flex items-end gap-4">
        <UploadPicture upload={upload} />
        {target && outline && <OutlineFigure grid={target} outline={outline} />}
      </div>
      {shown.part === 'habitat' && facts.classCounts ? (
        <p className="text-ink-2">
          {facts.classCounts.length} classes:{' '}
          {facts.classCounts
            .slice(0, 12)
            .map(({ value }) => value)
            .join(', ')}
          {facts.classCounts.length > 12 && ' …'}
        </p>
      ) : (
        <Histogram layer={facts} />
      )}
      <p className="text-ink-2">
        {facts.noDataShare === 0
          ? 'Every cell of the file has a value.'
          : `${formatShare(facts.noDataShare)} of its cells have no data.`}
      </p>
      <Sentence
        {...{ upload, shown }}
        disabled={choose.isPending}
        onChange={(change) => choose.mutate(change)}
      />
      {shown.part === 'elevation' && upload.heights && upload.heights.unit !== 'metre' && (
        <Notice
          title={`Its heights seem to be in ${heightUnitLabels[upload.heights.unit]}:`}
          className="my-1.5"
        >
          {upload.heights.because}.{' '}
          {shown.vertical === null ? (
            <>
              Choose what they are in before it is placed.{' '}
              <WordButton
                lined
                disabled={choose.isPending}
                onClick={() => choose.mutate({ vertical: { datum: '', unit: upload.heights!.unit } })}
              >
                They are in {heightUnitLabels[upload.heights.unit]}
              </WordButton>{' '}
              <WordButton
                lined
                disabled={choose.isPending}
                onClick={() => choose.mutate({ vertical: { datum: '', unit: 'metre' } })}
              >
                They are in metres
              </WordButton>
            </>
          ) : (
            `You have chosen ${heightUnitLabels[shown.vertical.unit]}.`
          )}
        </Notice>
      )}
      {plan && (
        <ul className="my-1">
          {planInWords(plan, shown.part === 'elevation' ? heightUnit : undefined).map((words) => (
            <li key={words}>{words}</li>
          ))}
        </ul>
      )}
      {replaced && (
        <p>
          It replaces <span className="font-mono wrap-anywhere">{replaced.source.fileName}</span>, which stays
          in the history of {shown.part}.
        </p>
      )}
      {upload.problem && (
        <Notice kind="problem" title="It cannot be placed like this." className="my-1.5">
          <Reasons upload={upload} />
        </Notice>
      )}
      {(choose.error ?? place.error) && (
        <ProblemNotice error={choose.error ?? place.error} className="my-1.5" />
      )}
      {grid && (
        <div className="mt-1 flex flex-wrap items-center gap-x-4 gap-y-1">
          <Button
            disabled={!isReady(upload) || choose.isPending}
            busy={place.isPending}
            onClick={() => place.mutate()}
          >
            {shown.part === null ? 'Place it' : `Place it as ${shown.part}`}
          </Button>
          {props.children}
        </div>
      )}
    </div>
  );
}

/** The decisions as blanks in a sentence. */
function Sentence(props: {
  upload: Upload;
  shown: Choices;
  disabled: boolean;
  onChange: (change: Partial<Choices>) => void;
}) {
  const { upload, shown, disabled, onChange } = props;
  const { description, plan, fileName } = upload;
  const bands = description?.bands ?? [];
  const vertical = shown.vertical ?? { datum: '', unit: upload.heights?.unit ?? 'metre' };
  // Classes have no mean.
  const methods = resamplingMethods.filter(
    (method) =>
      method === plan?.method ||
      method === 'nearest' ||
      (method !== 'copy' && (method === 'majority') === (plan?.content === 'classes')),
  );
  return (
    <div className="mt-1.5 leading-7">
      It plays{' '}
      <BlankSelect
        label={`The part that ${fileName} plays`}
        value={shown.part ?? ''}
        disabled={disabled}
        onChange={(event) => onChange({ part: event.target.value as LayerPart, method: null, unit: null })}
      >
        <option value="" disabled>
          choose its part
        </option>
        {layerParts.map((part) => (
          <option key={part} value={part}>
            {part}
          </option>
        ))}
      </BlankSelect>
      {bands.length > 1 && (
        <>
          {' '}
          from{' '}
          <BlankSelect
            label={`Band of ${fileName}`}
            value={shown.band ?? ''}
            disabled={disabled}
            onChange={(event) => onChange({ band: Number(event.target.value) })}
          >
            <option value="" disabled>
              choose its band
            </option>
            {bands.map(({ index, name }) => (
              <option key={index} value={index}>
                band {index}
                {name && `, ${name}`}
              </option>
            ))}
          </BlankSelect>
        </>
      )}
      {shown.part === 'resurvey' && (
        <>
          {' '}
          of{' '}
          <YearBlank
            label={`Year that ${fileName} was surveyed in`}
            year={shown.year}
            disabled={disabled}
            onYear={(year) => onChange({ year })}
          />
        </>
      )}
      {shown.part !== null && hasUnit(shown.part) && (
        <>
          , in{' '}
          <BlankSelect
            label={`What the values of ${fileName} are`}
            value={shown.unit ?? ''}
            disabled={disabled}
            onChange={(event) => onChange({ unit: event.target.value as ValueUnit })}
          >
            {shown.unit === null && <option value="">the unit that fits</option>}
            {valueUnits.map((unit) => (
              <option key={unit} value={unit}>
                {unitLabels[unit]}
              </option>
            ))}
          </BlankSelect>
        </>
      )}
      {shown.part === 'elevation' && (
        <>
          , in{' '}
          <HeightBlanks
            vertical={vertical}
            of={` of ${fileName}`}
            disabled={disabled}
            onChange={(next) => onChange({ vertical: next })}
          />
        </>
      )}
      {plan && plan.usualMethod !== 'copy' && (
        <>
          ; each cell takes{' '}
          <BlankSelect
            label={`How cells of ${fileName} are carried over`}
            value={plan.method}
            disabled={disabled}
            onChange={(event) => onChange({ method: event.target.value as ResamplingMethod })}
          >
            {methods.map((method) => (
              <option key={method} value={method}>
                {methodLabels[method]}
              </option>
            ))}
          </BlankSelect>
        </>
      )}
      .
    </div>
  );
}
