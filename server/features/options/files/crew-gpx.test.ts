import { expect, it } from 'vitest';
import { mostCrewPoints } from '#contract/option-files.ts';
import type { Work } from '#contract/works.ts';
import { crewCsv } from './crew-csv.ts';
import { crewGpx, type DegreePoint } from './crew-gpx.ts';
import { crewPoints } from './crew-stops.ts';

const mound = (id: string, x: number, more: Partial<Work> = {}) =>
  ({ id, kind: 'mound', year: 2027, x, y: 0, radius: 1.5, strength: 1, halo: 0, ...more }) as Work;
const ring: [number, number][] = [[30, 0], [40, 0], [40, 10]]; // prettier-ignore
const works: Work[] = [
  mound('a', 90),
  mound('b', 10, { name: '=Lee & <Co>' }),
  { id: 'f', kind: 'fence', year: 2027, area: { shape: 'polygon', ring }, strength: 1, until: 2031 },
  { id: 'c', kind: 'clumps', year: 2028, points: [[50, 0], [60, 0]], each: 5 }, // prettier-ignore
  { id: 'l', kind: 'loss', year: 2027, area: { shape: 'disc', x: 0, y: 0, radius: 2 }, share: 0.5 },
];
const inDegrees = (points: ReturnType<typeof crewPoints>): DegreePoint[] =>
  points.map((point) => ({ ...point, degrees: [point.place[0] / 1000, -point.place[1] / 1000] }));

it('lists what a crew goes to in the order of a short round; the corners of an outline stay together', () => {
  expect(crewPoints(works, undefined, undefined).map(({ name, task }) => `${name}: ${task}`)).toEqual([
    '001 =Lee & <Co>: mound of 1.5 m radius',
    '002 Fence 1, corner 1 of 3: fence inside the outline, until 2031',
    '003 Fence 1, corner 2 of 3: fence inside the outline, until 2031',
    '004 Fence 1, corner 3 of 3: fence inside the outline, until 2031',
    '005 Clumps 1, point 1: set 5 clumps',
    '006 Clumps 1, point 2: set 5 clumps',
    '007 Mound 1: mound of 1.5 m radius',
  ]);
  expect(crewPoints(works, 2028, [100, 0]).map(({ name }) => name)).toEqual([
    '001 Clumps 1, point 2',
    '002 Clumps 1, point 1',
  ]);
  const points = Array(mostCrewPoints + 1).fill([0, 0]) as [number, number][];
  const many: Work = { id: 'm', kind: 'clumps', year: 2027, points, each: 1 };
  expect(() => crewPoints([many], undefined, undefined)).toThrow(/Found 5001 points/);
});

interface Element {
  tag: string;
  attributes: Record<string, string>;
  children: Element[];
  text: string;
}
/** A strict reader of the XML that is written here: throws at whatever is not well-formed. */
function readXml(xml: string): Element {
  const root: Element = { tag: '', attributes: {}, children: [], text: '' };
  const open = [root];
  const token = /<(\/?)([a-z]+)((?: [a-zA-Z]+="[^"<&]*")*)>|([^<>&]|&(?:amp|lt|gt);)+/gy;
  while (token.lastIndex < xml.length) {
    const at = token.lastIndex;
    const found = token.exec(xml);
    if (!found) throw new Error(`Not well-formed at ${xml.slice(at, at + 40)}`);
    const [text, closes, tag, attributes] = found;
    const parent = open[open.length - 1];
    if (tag === undefined) parent.text += text;
    else if (closes) {
      if (open.pop()!.tag !== tag) throw new Error(`</${tag}> closes another element`);
    } else {
      const pairs = [...attributes.matchAll(/ ([a-zA-Z]+)="([^"]*)"/g)].map(([, name, value]) => [
        name,
        value,
      ]);
      const element = {
        tag,
        attributes: Object.fromEntries(pairs) as Record<string, string>,
        children: [],
        text: '',
      };
      parent.children.push(element);
      open.push(element);
    }
  }
  if (open.length > 1) throw new Error(`<${open[1].tag}> is left open`);
  return root.children[0];
}

// The schema of GPX 1.1 (Topografix 2004, gpx.xsd) does not ship with the product. What it demands of the parts that are
// written here stands below by hand: which children in which order, and which of them may repeat.
const childrenOf: Record<string, readonly string[]> = {
  gpx: ['metadata', 'wpt', 'rte', 'trk', 'extensions'],
  metadata: ['name', 'desc', 'author', 'copyright', 'link', 'time', 'keywords', 'bounds', 'extensions'],
  rte: ['name', 'cmt', 'desc', 'src', 'link', 'number', 'type', 'extensions', 'rtept'],
  wpt: ['ele', 'time', 'magvar', 'geoidheight', 'name', 'cmt', 'desc', 'src', 'link', 'sym', 'type', 'fix'],
};
const repeats = ['wpt', 'rte', 'rtept'];
function checkOrder({ tag, children }: Element): void {
  const order = childrenOf[tag === 'rtept' ? 'wpt' : tag] ?? [];
  const places = children.map((child) => order.indexOf(child.tag));
  expect(places, `children of ${tag}`).toEqual(places.toSorted((a, b) => a - b));
  expect(places).not.toContain(-1);
  for (const { tag: name } of children)
    if (!repeats.includes(name)) expect(children.filter((child) => child.tag === name)).toHaveLength(1);
  children.filter((child) => child.children.length > 0).forEach(checkOrder);
}

it('is GPX 1.1: every element where its schema has it, texts escaped, places as decimals in range', () => {
  const points = inDegrees(crewPoints(works, undefined, undefined));
  const gpx = crewGpx(points, 'Reach & Bank', 'Mind the <tide>\u0000.', new Date('2026-12-01T10:00:00Z'));
  const [declaration, ...rest] = gpx.split('\n');
  expect(declaration).toBe('<?xml version="1.0" encoding="UTF-8"?>');
  const root = readXml(rest.join('\n').trim());
  expect(root.tag).toBe('gpx');
  expect(root.attributes).toEqual({
    xmlns: 'http://www.topografix.com/GPX/1/1',
    version: '1.1',
    creator: 'Foothold',
  });
  checkOrder(root);
  const [metadata] = root.children;
  expect(metadata.children.map(({ tag, text }) => [tag, text])).toEqual([
    ['name', 'Reach &amp; Bank'],
    ['desc', 'Mind the &lt;tide&gt;.'],
    ['time', '2026-12-01T10:00:00.000Z'],
  ]);
  const waypoints = root.children.filter(({ tag }) => tag === 'wpt');
  const route = root.children.find(({ tag }) => tag === 'rte')!.children.filter(({ tag }) => tag === 'rtept');
  const told = (elements: Element[]) => elements.map(({ attributes, children }) => [attributes, children]);
  expect(told(route)).toEqual(told(waypoints));
  expect(waypoints).toHaveLength(7);
  expect(waypoints[0].children[0].text).toBe('001 =Lee &amp; &lt;Co&gt;');
  expect(waypoints[3].attributes).toEqual({ lat: '-0.010000000', lon: '0.040000000' });
});

it('gives the crew the same points as a table that no spreadsheet computes', () => {
  const lines = crewCsv(inDegrees(crewPoints(works, 2027, undefined))).split('\r\n');
  expect(lines[0]).toBe('order,name,task,kind,year,longitude,latitude,x_m,y_m');
  expect(lines[1]).toBe('1,001 =Lee & <Co>,mound of 1.5 m radius,mound,2027,0.01,0,10,0');
  expect(lines[4]).toBe(
    '4,"004 Fence 1, corner 3 of 3","fence inside the outline, until 2031",fence,2027,0.04,-0.01,40,10',
  );
});
