/** A way to draw: what the pointer, or the crosshair and its keys, do on the map. */
export type BoardTool =
  | 'select'
  | 'box'
  | 'mound'
  | 'scattered'
  | 'grid'
  | 'groups'
  | 'edge'
  | 'line'
  | 'clumped'
  | 'dispersed'
  | 'even'
  | 'fence'
  | 'loss';

/** Tools that lay a pattern of mounds. */
export const moundPatterns = ['scattered', 'grid', 'groups', 'edge', 'line'] as const;
/** Tools that lay a pattern of clumps in one planting. */
export const clumpPatterns = ['clumped', 'dispersed'] as const;
/** Tools that make one of the works of an outline. */
export const areaTools = ['even', 'fence', 'loss'] as const;
export type PatternTool = (typeof moundPatterns)[number] | (typeof clumpPatterns)[number];
export type AreaTool = (typeof areaTools)[number];

const among =
  <Tool extends BoardTool>(list: readonly Tool[]) =>
  (tool: BoardTool): tool is Tool =>
    (list as readonly BoardTool[]).includes(tool);
export const isClumpPattern = among(clumpPatterns);
export const isPattern = among<PatternTool>([...moundPatterns, ...clumpPatterns]);
export const isAreaTool = among(areaTools);

export interface ToolWords {
  readonly tool: BoardTool;
  readonly label: string;
  /** letter that chooses it while the map has the keyboard */
  readonly letter: string;
  /** what it is for, in a few words more */
  readonly hint: string;
}
export interface ToolGroup {
  readonly name: string;
  /** shown before the words: what they are all about */
  readonly symbol?: 'flag' | 'planting';
  readonly tools: readonly ToolWords[];
}

/** The tools in the order in which they stand above the map. */
export const toolGroups: readonly ToolGroup[] = [
  {
    name: 'Mounds',
    symbol: 'flag',
    tools: [
      { tool: 'mound', label: 'one by one', letter: 'm', hint: 'A press places a mound' },
      { tool: 'scattered', label: 'scattered', letter: 't', hint: 'At random, a distance apart' },
      { tool: 'grid', label: 'grid', letter: 'g', hint: 'In rows and columns' },
      { tool: 'groups', label: 'groups', letter: 'u', hint: 'Several around each of some middles' },
      { tool: 'edge', label: 'along the edge', letter: 'e', hint: 'Beside what stands today' },
      { tool: 'line', label: 'along a line', letter: 'l', hint: 'Along a line that you draw' },
    ],
  },
  {
    name: 'Planting',
    symbol: 'planting',
    tools: [
      { tool: 'clumped', label: 'clumped', letter: 'p', hint: 'Clumps in groups, inside an outline' },
      { tool: 'dispersed', label: 'dispersed', letter: 'd', hint: 'Clumps apart, inside an outline' },
      { tool: 'even', label: 'even cover', letter: 'c', hint: 'One cover all over an outline' },
    ],
  },
  {
    name: 'Areas',
    tools: [
      { tool: 'fence', label: 'fence', letter: 'f', hint: 'Keeps grazers out of an outline' },
      { tool: 'loss', label: 'loss', letter: 'x', hint: 'Cover expected to be lost in an outline' },
    ],
  },
  {
    name: 'Selection',
    tools: [
      { tool: 'select', label: 'select', letter: 's', hint: 'Select, move and reshape works' },
      { tool: 'box', label: 'box', letter: 'b', hint: 'Select all works inside a box' },
    ],
  },
];

/** The tool that a letter chooses. */
export const toolOfLetter = (letter: string): BoardTool | undefined =>
  toolGroups.flatMap((group) => group.tools).find((words) => words.letter === letter.toLowerCase())?.tool;
