import type { APIRequestContext } from '@playwright/test';
import { fillPath } from '#contract/endpoint.ts';
import { setClasses, uploadLayer } from '#contract/ground.ts';
import { createOption } from '#contract/options.ts';
import { completeSetup, getSession } from '#contract/people.ts';
import { createSite } from '#contract/sites.ts';
import { stream } from '#sim-core/random/streams.ts';
import { encodeGeoTiff } from '#rasters/write/geotiff.ts';

/** An invented square site of so many cells a side: patches that stand, obstacles, and a mound in the middle. */
export function benchGround(size: number) {
  const random = stream('bench page', 'parameters');
  const classes = Uint8Array.from({ length: size * size }, () => (random.quick() < 0.02 ? 1 : 2));
  const cover = new Float32Array(size * size);
  for (let patch = 0; patch < 40; patch++) {
    const [column, row] = [Math.floor(random.quick() * size), Math.floor(random.quick() * size)];
    for (let r = Math.max(0, row - 4); r < Math.min(size, row + 4); r++)
      for (let c = Math.max(0, column - 4); c < Math.min(size, column + 4); c++) cover[r * size + c] = 0.8;
  }
  const middle = size >> 1;
  // The mound and the ground around it are free of obstacles.
  for (let r = middle - 40; r < middle + 40; r++)
    classes.fill(2, r * size + middle - 40, r * size + middle + 40);
  const grid = { width: size, height: size, cellSize: 1, originX: 500_000, originY: 4_000_000, epsg: 32617 };
  return { grid, classes, cover };
}

/** Makes the first account on a fresh server. */
export async function firstTeam(request: APIRequestContext, token: string): Promise<string> {
  const data = {
    name: 'Bench Person',
    email: 'bench@foothold.example',
    password: 'a bench and no person',
    teamName: 'Bench',
  };
  const made = await request.post(fillPath(completeSetup.path, { token }), { data });
  if (!made.ok()) throw new Error(await made.text());
  const session = getSession.reply.parse(await (await request.get(getSession.path)).json());
  return session.memberships[0].teamId;
}

/** Makes the site through the API, with one option. @returns the address of its drawing board */
export async function benchSite(request: APIRequestContext, teamId: string, size: number): Promise<string> {
  const { grid, classes, cover } = benchGround(size);
  const file = (values: Uint8Array | Float32Array) => ({
    name: 'raster.tif',
    mimeType: 'image/tiff',
    buffer: Buffer.from(encodeGeoTiff({ grid, values })),
  });
  const sent = async (answer: ReturnType<APIRequestContext['post']>): Promise<unknown> => {
    const reply = await answer;
    if (!reply.ok()) throw new Error(await reply.text());
    return reply.json();
  };
  const site = createSite.reply.parse(
    await sent(
      request.post(fillPath(createSite.path, { teamId }), {
        multipart: { name: `Bench ${size}`, part: 'habitat', file: file(classes) },
        timeout: 0,
      }),
    ),
  );
  const siteId = site.id;
  await sent(
    request.put(fillPath(setClasses.path, { siteId, layerId: site.layers[0].id }), {
      data: {
        classes: [
          { value: 1, name: 'Creek', colour: '#6b7f8a', capacity: 0, vigour: 0 },
          { value: 2, name: 'Marsh', colour: '#6b7f5a', capacity: 1, vigour: 1 },
        ],
      },
    }),
  );
  await sent(
    request.post(fillPath(uploadLayer.path, { siteId }), {
      multipart: { part: 'cover', file: file(cover) },
      timeout: 0,
    }),
  );
  const [x, y] = [grid.originX + size / 2 + 0.5, grid.originY - size / 2 - 0.5];
  const works = [
    { kind: 'mound', year: site.outlook.surveyYear + 1, x, y, radius: 1.5, strength: 1, halo: 1 },
    { kind: 'clumps', year: site.outlook.surveyYear + 1, points: [[x, y]], each: 9 },
  ];
  const option = createOption.reply.parse(
    await sent(request.post(fillPath(createOption.path, { siteId }), { data: { name: 'Drag', works } })),
  );
  return `/sites/${siteId}/options?option=${option.id}`;
}
