import type { Grid } from '#sim-core/grid/grid.ts';
import type { Ground } from '#sim-core/grid/ground.ts';
import type { ClosingSummary } from '#sim-core/plan/closing-tally.ts';
import { lineYears, yearLines, type YearLine } from '#sim-core/plan/year-lines.ts';
import { layPattern, type LaidPoints, type PatternInput } from '#sim-core/plan/pattern.ts';
import { createQuickLook, type QuickLook, type WorksChange } from '#sim-core/plan/quick-look.ts';
import { toTexels } from '#app/map/map-raster.ts';
import { groundOf } from './run-ground.ts';
import type { RunInput } from './run-loop.ts';

/** What a quick look starts from: a run's spec, whose actions are left out, and its ground. */
export interface QuickLookStart extends RunInput {
  /** not 0 where works are allowed; everywhere unless said */
  readonly allowed?: Uint8Array;
}

/** What growth alone would do with the works as they are. */
export interface Look {
  /** as a run reports them: 0 not by the horizon, −32768 cannot hold the plant, the survey year stood; Int16, row-major */
  readonly years: Int16Array;
  /** the same as a map paints them (`toTexels`) */
  readonly texels: Uint8Array;
  readonly summary: ClosingSummary;
}

/** A pattern to be laid on the ground that the desk holds. */
export type PatternRequest = Pick<PatternInput, 'pattern' | 'ring' | 'bareOnly' | 'seed'>;

/** The one ground that is looked at, with the works that are on it. */
export interface QuickLookDesk {
  /** Takes a ground, without works. @throws RunProblem, CellValuesError */
  open(start: QuickLookStart): Promise<Look>;
  change(change: WorksChange): Look;
  /** Lines of closing years with the works as they are: they take longer than the years, so they are asked for apart. */
  lines(): YearLine[];
  /** @throws RangeError where the pattern makes no sense */
  lay(request: PatternRequest): LaidPoints;
}

export function createQuickLookDesk(): QuickLookDesk {
  let held:
    | {
        readonly look: QuickLook;
        readonly grid: Grid;
        readonly ground: Ground;
        readonly start: QuickLookStart;
      }
    | undefined;
  const opened = () => {
    if (!held) throw new Error('No ground was opened.');
    return held;
  };
  function shown(): Look {
    const { look, start } = opened();
    const { surveyYear, years: horizon } = start.spec;
    // A copy, since it is handed over.
    const years = look.years.slice();
    const texels = toTexels({ kind: 'closing', values: years, surveyYear, lastYear: surveyYear + horizon });
    return { years, texels, summary: look.summary() };
  }
  return {
    async open(start) {
      const { spec, grid } = start;
      const ground = await groundOf(start);
      const { rates, stepsPerYear, surveyYear, years } = spec;
      const look = createQuickLook({ grid, ground, rates, stepsPerYear, surveyYear, years });
      held = { look, grid, ground, start };
      return shown();
    },
    change(change) {
      opened().look.change(change);
      return shown();
    },
    lines() {
      const { look, grid, ground, start } = opened();
      const { surveyYear, years } = start.spec;
      return yearLines({
        grid,
        closing: (cell) => look.closing(cell),
        holds: (cell) => ground.capacity[cell] > 0,
        surveyYear,
        horizon: years,
        years: lineYears(surveyYear, years),
      });
    },
    lay(request) {
      const { grid, ground, start } = opened();
      const { capacity, cover } = ground;
      return layPattern({ ...request, grid, capacity, cover, allowed: start.allowed });
    },
  };
}
