import type { ComparisonPlan } from '#contract/comparisons.ts';
import { BlankSelect } from '#app/components/blank.tsx';
import type { StudySettings } from './study-settings.ts';

/** What is asked, as a sentence with blanks. */
export function QuestionLine(props: {
  plan: ComparisonPlan;
  settings: StudySettings;
  onChange: (changes: Record<string, string | undefined>) => void;
}) {
  const { plan, settings, onChange } = props;
  const { options, outlooks, common } = plan;
  const { option, than, measure, outlook } = settings;
  const years = Array.from({ length: common.years }, (_, i) => common.surveyYear + 1 + i);
  return (
    <p className="flex flex-wrap items-baseline gap-x-1.5 gap-y-2 text-[14.5px] leading-loose">
      <span>What decides</span>
      <BlankSelect
        label="What is measured"
        value={measure.kind}
        onChange={(event) => {
          const kind = event.target.value;
          onChange({ measure: kind === 'recovery' ? undefined : kind });
        }}
      >
        <option value="recovery">years to recovery</option>
        <option value="covered">the covered area</option>
        <option value="closed">the share closed</option>
      </BlankSelect>
      {measure.kind !== 'recovery' && (
        <>
          <span>by the end of</span>
          <BlankSelect
            label="Year"
            value={measure.year}
            onChange={(event) => onChange({ year: event.target.value })}
          >
            {years.map((year) => (
              <option key={year}>{year}</option>
            ))}
          </BlankSelect>
        </>
      )}
      <span>of</span>
      <BlankSelect
        label="Option"
        className="max-w-full"
        value={option}
        onChange={(event) => onChange({ option: event.target.value })}
      >
        {options.map(({ name, optionId }, i) => (
          <option key={optionId} value={i}>
            {name}
          </option>
        ))}
      </BlankSelect>
      {options.length > 1 && (
        <BlankSelect
          label="Alone, or against another option"
          className="max-w-full"
          value={than ?? 'alone'}
          onChange={(event) =>
            onChange({ than: event.target.value === 'alone' ? undefined : event.target.value })
          }
        >
          <option value="alone">alone</option>
          {options.map(
            ({ name, optionId }, i) =>
              i !== option && (
                <option key={optionId} value={i}>
                  against {name}
                </option>
              ),
          )}
        </BlankSelect>
      )}
      {outlooks.length > 1 && (
        <>
          <span>under</span>
          <BlankSelect
            label="Outlook"
            className="max-w-full"
            value={outlook}
            onChange={(event) => onChange({ outlook: event.target.value })}
          >
            {outlooks.map(({ name }, i) => (
              <option key={i} value={i}>
                {name}
              </option>
            ))}
          </BlankSelect>
        </>
      )}
      <span>?</span>
    </p>
  );
}
