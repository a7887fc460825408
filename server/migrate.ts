import type { Sequelize } from 'sequelize';
import { SequelizeStorage, Umzug } from 'umzug';

import { migrations as all } from './migrations';

/** Migrations of this database, with `up`, `down` and `pending`. */
export const migrator = (sequelize: Sequelize, migrations = all) =>
  new Umzug({
    migrations: migrations.map(({ name, up, down }) => ({ name, up, down })),
    context: sequelize.getQueryInterface(),
    storage: new SequelizeStorage({ sequelize, tableName: 'migrations' }),
    logger: undefined,
  });

const lockKey = 4180_0001;

/** Runs what is pending. An advisory lock keeps two servers that start together from doing it twice. */
export async function migrate(sequelize: Sequelize): Promise<string[]> {
  return sequelize.transaction(async (transaction) => {
    await sequelize.query('select pg_advisory_xact_lock(:key)', { replacements: { key: lockKey }, transaction });
    const done = await migrator(sequelize).up();
    return done.map(({ name }) => name);
  });
}
