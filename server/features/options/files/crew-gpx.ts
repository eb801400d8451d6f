import type { CrewPoint } from './crew-stops.ts';
import type { Point } from '#server/files/place-projection.ts';

/** A crew point with its place in WGS 84. */
export type DegreePoint = CrewPoint & { readonly degrees: Point };

/**
 * GPX 1.1 (Topografix 2004): the points as waypoints whose names sort in the order of visit, and the round as a route.
 * Elements stand in the order that its schema demands.
 */
export function crewGpx(
  points: readonly DegreePoint[],
  title: string,
  description: string,
  time: Date,
): string {
  const lines = [
    '<?xml version="1.0" encoding="UTF-8"?>',
    '<gpx xmlns="http://www.topografix.com/GPX/1/1" version="1.1" creator="Foothold">',
    '<metadata>',
    element('name', title),
    element('desc', description),
    element('time', time.toISOString()),
    '</metadata>',
    ...points.map((point) => waypoint('wpt', point)),
  ];
  if (points.length > 1)
    lines.push('<rte>', element('name', title), ...points.map((point) => waypoint('rtept', point)), '</rte>');
  return `${lines.join('\n')}\n</gpx>\n`;
}

function waypoint(
  tag: 'wpt' | 'rtept',
  { degrees: [lon, lat], name, task, kind, year }: DegreePoint,
): string {
  const told = `${task}, ${year}`;
  return (
    `<${tag} lat="${lat.toFixed(9)}" lon="${lon.toFixed(9)}">` +
    `${element('name', name)}${element('cmt', told)}${element('desc', told)}${element('type', kind)}</${tag}>`
  );
}

const element = (tag: string, text: string): string => `<${tag}>${escaped(text)}</${tag}>`;

const entities: Record<string, string> = { '&': '&amp;', '<': '&lt;', '>': '&gt;' };

// eslint-disable-next-line no-control-regex -- these are the characters that XML 1.0 cannot hold
const forbidden = /[\u0000-\u0008\u000B\u000C\u000E-\u001F\uFFFE\uFFFF]/g;

const escaped = (text: string): string =>
  text.replace(forbidden, '').replace(/[&<>]/g, (mark) => entities[mark]);
