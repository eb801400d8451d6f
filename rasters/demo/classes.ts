/** The habitat classes of the invented site: what they are, how they look on a map, what they can bear. */
export const habitatValue = { noData: 0, creek: 1, bank: 2, low: 3, high: 4, levee: 5 } as const;

export interface DemoClass {
  readonly value: number;
  readonly name: string;
  readonly colour: string;
  /** largest share of a cell that the plant can hold */
  readonly capacity: number;
  /** growth as a share of growth on good ground */
  readonly vigour: number;
}

/** Invented, like the site: capacities and growths are common practice, no source. */
export const demoClasses: readonly DemoClass[] = [
  { value: habitatValue.creek, name: 'Creek', colour: '#b7c4ce', capacity: 0, vigour: 0 },
  { value: habitatValue.bank, name: 'Creek bank', colour: '#a7a58f', capacity: 0.7, vigour: 0.9 },
  { value: habitatValue.low, name: 'Low platform', colour: '#9db28d', capacity: 0.95, vigour: 1 },
  { value: habitatValue.high, name: 'High platform', colour: '#cdbfa3', capacity: 0.9, vigour: 0.8 },
  { value: habitatValue.levee, name: 'Levee', colour: '#6d8f69', capacity: 1, vigour: 1 },
];
