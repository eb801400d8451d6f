import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { gridSchema } from '#contract/grid.ts';
import { alignmentSchema, storedSourceSchema } from '#contract/layers.ts';
import { plantSchema } from '#contract/plants.ts';
import { defaultRates } from '#sim-core/spec/parameters.ts';
import { TeamEntity } from './entities/team.ts';
import { LostYear1764576000000 } from './migrations/1764576000000-lost-year.ts';
import { OptionHistory1764580000000 } from './migrations/1764580000000-option-history.ts';
import { Ground1796119200000 } from './migrations/1796119200000-ground.ts';
import { Plants1796150000000 } from './migrations/1796150000000-plants.ts';
import { migrations } from './migrations/index.ts';
import { openDatabase, openWriter, type Database } from './open-database.ts';

/** Takes a migration back, and all that came after it. */
async function undo(writer: Awaited<ReturnType<typeof openWriter>>, migration: (typeof migrations)[number]) {
  for (let i = migrations.length; i > migrations.indexOf(migration); i--) await writer.undoLastMigration();
}

let folder: string;
let file: string;
let database: Database;
beforeEach(async () => {
  folder = mkdtempSync(join(tmpdir(), 'foothold-database-'));
  file = join(folder, 'foothold.sqlite');
  database = await openDatabase(file);
});
afterEach(async () => {
  await database.close();
  rmSync(folder, { recursive: true, force: true });
});

const team = (id: string) => ({ id, name: `Team ${id}`, createdAt: '2026-01-01T00:00:00.000Z' });
const teamIds = async () => {
  const rows = await database.dataSource.getRepository(TeamEntity).find({ order: { id: 'ASC' } });
  return rows.map((row) => row.id);
};
const soon = () => new Promise<void>((resolve) => setImmediate(resolve));

describe('the write queue', () => {
  it('keeps one write apart from another that rolls back at the same time', async () => {
    const failing = database.write(async (manager) => {
      await manager.getRepository(TeamEntity).insert(team('lost'));
      for (let i = 0; i < 5; i++) await soon();
      throw new Error('changed my mind');
    });
    const lasting = database.write(async (manager) => {
      await manager.getRepository(TeamEntity).insert(team('kept'));
      await soon();
      return 'done';
    });
    await expect(failing).rejects.toThrow('changed my mind');
    await expect(lasting).resolves.toBe('done');
    expect(await teamIds()).toEqual(['kept']);
  });

  it('is needed: on the bare connection the rollback of one takes the other along', async () => {
    const writer = await openWriter(join(folder, 'bare.sqlite'));
    await writer.runMigrations();
    const failing = writer.transaction(async (manager) => {
      await manager.getRepository(TeamEntity).insert(team('lost'));
      for (let i = 0; i < 5; i++) await soon();
      throw new Error('changed my mind');
    });
    const lasting = writer.transaction(async (manager) => {
      await manager.getRepository(TeamEntity).insert(team('kept'));
    });
    await Promise.allSettled([failing, lasting]);
    const kept = await writer.getRepository(TeamEntity).countBy({ id: 'kept' });
    await writer.destroy();
    // Once this fails, the driver has learnt to keep transactions apart, and the queue may go.
    expect(kept).toBe(0);
  });

  it('runs writes in the order in which they were asked for', async () => {
    const order: number[] = [];
    await Promise.all(
      [3, 0, 2, 1].map((pauses, index) =>
        database.write(async () => {
          for (let i = 0; i < pauses; i++) await soon();
          order.push(index);
        }),
      ),
    );
    expect(order).toEqual([0, 1, 2, 3]);
  });

  it('goes on after a write that failed', async () => {
    await expect(database.write(() => Promise.reject(new Error('no')))).rejects.toThrow('no');
    await database.write((manager) => manager.getRepository(TeamEntity).insert(team('after')));
    expect(await teamIds()).toEqual(['after']);
  });

  it('refuses a write inside a write, which would wait for itself', async () => {
    const nested = database.write(() => database.write(() => Promise.resolve()));
    await expect(nested).rejects.toThrow('write() was called inside write()');
  });
});

describe('the reading connection', () => {
  it('does not see a transaction that is still open', async () => {
    let seen: string[] | undefined;
    await database.write(async (manager) => {
      await manager.getRepository(TeamEntity).insert(team('open'));
      seen = await teamIds();
    });
    expect(seen).toEqual([]);
    expect(await teamIds()).toEqual(['open']);
  });

  it('cannot write', async () => {
    const insert = database.dataSource.getRepository(TeamEntity).insert(team('past the queue'));
    await expect(insert).rejects.toThrow('readonly');
    expect(await teamIds()).toEqual([]);
  });
});

describe('the schema', () => {
  it('is what the entities say, by migrations alone', async () => {
    const writer = await openWriter(file);
    const { upQueries } = await writer.driver.createSchemaBuilder().log();
    await writer.destroy();
    expect(upQueries.map((query) => query.query)).toEqual([]);
  });

  it('goes back down to nothing, and up again', async () => {
    const writer = await openWriter(join(folder, 'again.sqlite'));
    await writer.runMigrations();
    for (let i = 0; i < migrations.length; i++) await writer.undoLastMigration();
    const left = await writer.query<{ name: string }[]>(
      `SELECT name FROM sqlite_master WHERE type = 'table' AND name NOT LIKE 'sqlite_%' AND name <> 'migrations'`,
    );
    expect(left).toEqual([]);
    expect(await writer.runMigrations()).toHaveLength(migrations.length);
    await writer.destroy();
  });

  it('reads off the series of runs that are kept when they lost again what they had recovered', async () => {
    const writer = await openWriter(file);
    await undo(writer, LostYear1764576000000);
    await writer.query('PRAGMA foreign_keys = OFF');
    const shares = { lost: [0.2, 0.92, 0.3, 0.95, 0.1], kept: [0.2, 0.92, 0.95, 0.95, 0.95] };
    for (const [id, series] of Object.entries(shares)) {
      const rows = series.map((recoveredShare, i) => ({ time: 2024 + i, recoveredShare }));
      await writer.query(
        `INSERT INTO "run" ("id", "siteId", "optionName", "name", "status", "spec", "grid", "crsName", "seed", "mode",
          "surveyYear", "years", "result", "recoveredYear", "startedAt", "startedBy")
         VALUES (?, 's', '', '', 'finished', '{"target":0.9}', '{}', '', '', 'counts', 2024, 4, ?, 2025, '', '')`,
        [id, JSON.stringify({ series: rows })],
      );
    }
    await writer.runMigrations();
    const found = await writer.query<unknown>(`SELECT "id", "lostYear" FROM "run" ORDER BY "id"`);
    await writer.destroy();
    expect(found).toEqual([
      { id: 'kept', lostYear: null },
      { id: 'lost', lostYear: 2026 },
    ]);
  });

  it('gives plants that are kept empty beliefs and sources, and takes them back', async () => {
    const writer = await openWriter(file);
    await undo(writer, Plants1796150000000);
    await writer.query('PRAGMA foreign_keys = OFF');
    const before = { name: 'Grass', rates: defaultRates };
    await writer.query(
      `INSERT INTO "site" ("id", "teamId", "name", "invented", "width", "height", "cellSize", "originX", "originY", "epsg",
        "crsName", "plant", "plantSet", "outlook", "outlookSet", "createdAt")
       VALUES ('s', 't', '', 0, 1, 1, 1, 0, 0, 32631, '', ?, 1, '{}', 1, '')`,
      [JSON.stringify(before)],
    );
    await writer.runMigrations();
    const read = async () =>
      (await writer.query<{ plant: string }[]>(`SELECT "plant" FROM "site"`)).map(
        ({ plant }) => JSON.parse(plant) as unknown,
      );
    const [migrated] = await read();
    expect(plantSchema.parse(migrated)).toEqual(migrated);
    expect(migrated).toEqual({ ...before, beliefs: {}, sources: {}, fieldNumbers: {} });
    await undo(writer, Plants1796150000000);
    expect(await read()).toEqual([before]);
    await writer.destroy();
  });

  it('gives the works that are kept ids and the options their order, Wait first', async () => {
    const writer = await openWriter(file);
    await undo(writer, OptionHistory1764580000000);
    await writer.query('PRAGMA foreign_keys = OFF');
    const options = [
      [
        'later',
        0,
        '2026-03-01',
        [
          { kind: 'loss', share: 0.1 },
          { kind: 'mound', x: 412_203.123456789 },
        ],
      ],
      ['wait', 1, '2026-02-01', []],
      ['sooner', 0, '2026-01-01', []],
    ] as const;
    for (const [id, wait, createdAt, works] of options)
      await writer.query(
        `INSERT INTO "option" ("id", "siteId", "wait", "name", "works", "revision", "createdAt", "changedAt", "changedBy")
         VALUES (?, 's', ?, '', ?, 1, ?, '', '')`,
        [id, wait, JSON.stringify(works), createdAt],
      );
    await writer.runMigrations();
    const found = await writer.query<{ id: string; works: string }[]>(
      `SELECT "id", "works", "place", "note", "archived", "sets" FROM "option" ORDER BY "place"`,
    );
    await writer.destroy();
    const plain = { note: '', archived: 0, sets: '[]' };
    expect(found.map(({ works, ...row }) => ({ ...row, works: JSON.parse(works) as unknown }))).toEqual([
      { id: 'wait', place: 0, works: [], ...plain },
      { id: 'sooner', place: 1, works: [], ...plain },
      {
        id: 'later',
        place: 2,
        works: [
          { kind: 'loss', share: 0.1, id: 'w1' },
          { kind: 'mound', x: 412_203.123456789, id: 'w2' },
        ],
        ...plain,
      },
    ]);
  });

  it('keeps layers of before as layers that are made from the very file that they are', async () => {
    const writer = await openWriter(file);
    await undo(writer, Ground1796119200000);
    await writer.query('PRAGMA foreign_keys = OFF');
    await writer.query(
      `INSERT INTO "site" VALUES ('s', 't', '', 0, 6, 4, 2, 412200, 5301900, 32631, 'UTM', '{}', 0, '{}', 0, '')`,
    );
    await writer.query(
      `INSERT INTO "layer" VALUES ('l', 's', 'cover', 'c.tif', 'h', 7, 'v', 8, '{"crsName":"UTM 31"}', 'share', NULL, 'u', 'by', NULL)`,
    );
    await writer.query('PRAGMA foreign_keys = ON');
    await writer.runMigrations();
    const [layer] = await writer.query<Record<string, string>[]>(`SELECT * FROM "layer"`);
    await writer.undoLastMigration();
    const before = await writer.query<unknown>(`SELECT * FROM "layer"`);
    await writer.destroy();
    expect(layer).toMatchObject({
      id: 'l',
      hash: 'h',
      sourceHash: 'h',
      sourceBytes: 7,
      note: '',
      vertical: null,
    });
    expect(gridSchema.parse(JSON.parse(layer.grid))).toMatchObject({ width: 6, cellSize: 2, epsg: 32631 });
    expect(storedSourceSchema.parse(JSON.parse(layer.source))).toMatchObject({
      crsName: 'UTM 31',
      cellHeight: 2,
      band: 1,
    });
    expect(alignmentSchema.parse(JSON.parse(layer.alignment))).toMatchObject({ method: 'copy' });
    expect(before).toMatchObject([{ id: 'l', hash: 'h', facts: '{"crsName":"UTM 31"}', replacedAt: null }]);
  });

  it('keeps WAL, foreign keys and durable commits', async () => {
    const writer = await openWriter(file);
    const pragma = async (name: string) =>
      Object.values((await writer.query<Record<string, unknown>[]>(`PRAGMA ${name}`))[0])[0];
    const found = [await pragma('journal_mode'), await pragma('foreign_keys'), await pragma('synchronous')];
    await writer.destroy();
    expect(found).toEqual(['wal', 1, 2]);
  });
});
