import { QueryTypes, type QueryInterface, type Sequelize } from 'sequelize';
import { Umzug, type UmzugStorage } from 'umzug';

import { migrations as all } from './migrations';
import { noteDone, noteUndone, notesTable } from './migrations/sql';

/** What was done. A migration written as SQL has noted itself already, in its own transaction; then this adds nothing. */
const notes = (sequelize: Sequelize): UmzugStorage<QueryInterface> => ({
  async executed() {
    await sequelize.query(notesTable);
    const rows = await sequelize.query<{ name: string }>('select name from migrations order by name', {
      type: QueryTypes.SELECT,
    });
    return rows.map(({ name }) => name);
  },
  async logMigration({ name }) {
    await sequelize.query(noteDone, { replacements: { name } });
  },
  async unlogMigration({ name }) {
    await sequelize.query(noteUndone, { replacements: { name } });
  },
});

/** Migrations of this database, with `up`, `down` and `pending`. */
export const migrator = (sequelize: Sequelize, migrations = all) =>
  new Umzug({
    migrations: migrations.map(({ name, up, down }) => ({ name, up, down })),
    context: sequelize.getQueryInterface(),
    storage: notes(sequelize),
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
