import type { WorksPreview } from '#contract/option-files.ts';
import { newWorkId, workSchema, type Work, type WorkSet } from '#contract/works.ts';
import type { Grid } from '#sim-core/grid/grid.ts';
import { fieldProblems } from '#sim-core/spec/problems.ts';
import { checkWorksOnGrid } from '../works-on-grid.ts';

/** What a reader makes of a file. */
export interface FoundFile {
  readonly format: WorksPreview['format'];
  readonly crsName: string;
  readonly name: string;
  readonly note: string;
  readonly sets: readonly WorkSet[];
  readonly found: FoundWorks;
}

/** Problems that a reply lists; the rest is counted. */
const mostProblems = 200;

/** What a mound is taken for where a file does not say: the usual of the drawing board. */
const usual = { radius: 1.5, strength: 1, halo: 0 };

/** The works that a file holds, with what could not be read and what was taken for granted. */
export class FoundWorks {
  readonly works: Work[] = [];
  readonly problems: WorksPreview['problems'] = [];
  readonly assumed = new Map<string, number>();
  moreProblems = 0;
  private readonly ids = new Set<string>();
  private readonly grid: Grid;
  private readonly firstYear: number;
  private readonly rowWord: string;

  /** @param firstYear the first year that can be simulated, for works without one */
  constructor(grid: Grid, firstYear: number, rowWord: string) {
    this.grid = grid;
    this.firstYear = firstYear;
    this.rowWord = rowWord;
  }

  problem(row: number | null, message: string): void {
    if (this.problems.length < mostProblems)
      this.problems.push({ row, message: row === null ? message : `${this.rowWord} ${row}: ${message}` });
    else this.moreProblems++;
  }

  /** Takes one of the works whose places are in the site's CRS, or says what is wrong with it. */
  add(row: number, raw: Record<string, unknown>): void {
    const filled = this.fill(raw);
    const { data, error } = workSchema.safeParse(filled.raw);
    if (!data) {
      const said = fieldProblems(error).map(({ field, message }) =>
        field ? `${field}: ${message}` : message,
      );
      return this.problem(row, said.slice(0, 3).join('; '));
    }
    const wrong = checkWorksOnGrid([data], this.grid)?.message;
    if (wrong !== undefined) return this.problem(row, wrong);
    for (const words of filled.assumed) this.assumed.set(words, (this.assumed.get(words) ?? 0) + 1);
    const id = this.ids.has(data.id) ? newWorkId() : data.id;
    this.ids.add(id);
    this.works.push({ ...data, id });
  }

  private fill(raw: Record<string, unknown>): { raw: Record<string, unknown>; assumed: string[] } {
    const assumed: string[] = [];
    const filled = { ...raw };
    const fill = (name: string, value: number, words: string) => {
      if (filled[name] !== undefined) return;
      filled[name] = value;
      assumed.push(words);
    };
    fill('year', this.firstYear, `the year ${this.firstYear}`);
    if (filled.kind === 'mound') {
      fill('radius', usual.radius, `a radius of ${usual.radius} m`);
      fill('strength', usual.strength, 'full strength');
      fill('halo', usual.halo, 'no halo');
    }
    return { raw: filled, assumed };
  }
}
