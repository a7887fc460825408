import { afterAll, beforeAll, describe, expect, it } from 'vitest';

import { openDb, type Db } from '@/server/db';
import { migrate, migrator } from '@/server/migrate';
import { migrations } from '@/server/migrations';
import { sqlMigration } from '@/server/migrations/sql';
import * as models from '@/server/models';
import { freshDatabase, type Fresh } from '../support/fresh-database';

let fresh: Fresh;
let db: Db;
beforeAll(async () => {
  fresh = await freshDatabase();
  db = fresh.db;
});
afterAll(() => fresh.drop());

const names = migrations.map(({ name }) => name);

/** Everything that the schema consists of, as text that can be compared. */
async function schema(): Promise<string[]> {
  const { rows } = await db.pool.query<{ line: string }>(`
    select line from (
      select 'column ' || table_name || '.' || column_name || ' ' || data_type || ' ' || is_nullable || ' '
        || coalesce(column_default, '') as line from information_schema.columns where table_schema = 'public'
      union all select 'index ' || indexdef from pg_indexes where schemaname = 'public'
      union all select 'constraint ' || conrelid::regclass || ' ' || pg_get_constraintdef(oid)
        from pg_constraint where connamespace = 'public'::regnamespace
      union all select 'function ' || proname from pg_proc where pronamespace = 'public'::regnamespace
      union all select 'trigger ' || tgrelid::regclass || ' ' || tgname from pg_trigger where not tgisinternal
    ) lines order by line`);
  return rows.map((row) => row.line);
}
const applied = async () => (await migrator(db.sequelize).executed()).map(({ name }) => name);

describe('the migrations', () => {
  it('are all applied to a fresh database, and then nothing is left to do', async () => {
    expect(await applied()).toEqual(names);
    expect(await migrate(db.sequelize)).toEqual([]);
  });

  it('go down one by one until nothing is left, and up again to the same schema', async () => {
    const before = await schema();
    expect(before.length).toBeGreaterThan(150);
    for (const name of [...names].reverse()) {
      expect((await migrator(db.sequelize).down()).map((done) => done.name)).toEqual([name]);
    }
    const bare = (await schema()).filter((line) => !/\bmigrations\b/.test(line));
    expect(bare).toEqual([]);
    expect(await migrate(db.sequelize)).toEqual(names);
    expect(await schema()).toEqual(before);
  });

  it('are run once when servers start together', async () => {
    await migrator(db.sequelize).down({ to: 0 });
    const others = [openDb(fresh.url, 3), openDb(fresh.url, 3), openDb(fresh.url, 3)];
    const done = await Promise.all(others.map((other) => migrate(other.sequelize)));
    expect(done.flat().sort()).toEqual([...names].sort());
    await Promise.all(others.map((other) => other.close()));
    expect(await applied()).toEqual(names);
  });
});

describe('a migration that stops in the middle', () => {
  const half = {
    name: '9999-half',
    ...sqlMigration({
      up: 'create table half_done (id integer); insert into half_done values (1); select 1 / 0;',
      down: 'drop table half_done;',
    }),
  };

  it('leaves nothing behind, and the next start tries it again', async () => {
    const before = await schema();
    await expect(migrator(db.sequelize, [...migrations, half]).up()).rejects.toThrow(/division by zero/);
    expect(await schema()).toEqual(before);
    expect(await applied()).toEqual(names);
    const mended = {
      ...half,
      ...sqlMigration({ up: 'create table half_done (id integer);', down: 'drop table half_done;' }),
    };
    const all = [...migrations, mended];
    expect((await migrator(db.sequelize, all).up()).map(({ name }) => name)).toEqual([half.name]);
    await migrator(db.sequelize, all).down();
    expect(await schema()).toEqual(before);
  });

  it('is noted in the transaction that does it: a stop right after it does not do it twice', async () => {
    const whole = {
      name: '9999-whole',
      ...sqlMigration({ up: 'create table whole (id integer);', down: 'drop table whole;' }),
    };
    const all = [...migrations, whole];
    // the process is gone after the migration's own transaction, before anything else is written
    await whole.up({ name: whole.name, context: db.sequelize.getQueryInterface() });
    expect(await migrator(db.sequelize, all).up()).toEqual([]);
    await migrator(db.sequelize, all).down();
    expect(await applied()).toEqual(names);
  });
});

describe('the models', () => {
  const all = Object.values(models).flatMap((model) => ('getAttributes' in model ? [model] : []));

  it('are one for each table that is not kept by the driver alone', async () => {
    const { rows } = await db.pool.query<{ name: string }>(
      "select table_name as name from information_schema.tables where table_schema = 'public'",
    );
    const byDriver = ['migrations', 'sessions', 'worker_beats'];
    expect(
      all
        .map((model) => model.tableName)
        .concat(byDriver)
        .sort(),
    ).toEqual(rows.map((row) => row.name).sort());
  });

  it.each(all.map((model) => [model.name, model] as const))(
    'name only columns that are there: %s',
    async (_, model) => {
      const { rows } = await db.pool.query<{ column_name: string }>(
        "select column_name from information_schema.columns where table_schema = 'public' and table_name = $1",
        [model.tableName],
      );
      const columns = new Set(rows.map((row) => row.column_name));
      const fields = Object.values(model.rawAttributes).map((attribute) => attribute.field ?? '');
      expect(fields.length).toBeGreaterThan(2);
      expect(fields.filter((field) => !columns.has(field))).toEqual([]);
    },
  );

  it('give dates, times of day, wall-clock moments and figures as text and numbers, in whatever zone the machine is', async () => {
    const { rows } = await db.pool.query(
      `select date '2026-02-28' as d, time '05:30' as c, timestamp '2026-10-04 02:30' as l, 2.5::numeric as n,
        2.5::double precision as f`,
    );
    expect(rows).toEqual([{ d: '2026-02-28', c: '05:30', l: '2026-10-04T02:30', n: 2.5, f: 2.5 }]);
    const [first] = await db.sequelize.query(
      "select date '2026-02-28' as d, time '05:30' as c, timestamp '2026-10-04 02:30' as l, 2.5::double precision as f",
    );
    expect(first).toEqual([{ d: '2026-02-28', c: '05:30', l: '2026-10-04T02:30', f: 2.5 }]);
  });
});
