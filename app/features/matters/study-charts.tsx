import type { StudyFigures } from '#sim-core/matters/study-figures.ts';
import { IndexChart } from './index-chart.tsx';
import { RateCurves, Tornado } from './rate-charts.tsx';
import { ScreeningChart } from './screening-chart.tsx';

/** What a study found, drawn as its method asks. */
export function StudyCharts(props: { figures: StudyFigures; unit: string; digits: number }) {
  const { figures, unit, digits } = props;
  switch (figures.method) {
    case 'one-at-a-time':
      return (
        <div className="grid gap-8">
          <Tornado {...{ figures, unit, digits }} />
          <RateCurves {...{ figures, unit, digits }} />
        </div>
      );
    case 'screening':
      return <ScreeningChart {...{ figures, unit, digits }} />;
    case 'indices':
      return <IndexChart figures={figures} />;
  }
}
