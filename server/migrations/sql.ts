import type { QueryInterface } from 'sequelize';
import type { MigrationFn } from 'umzug';

/** Names of migrations done, in the shape that umzug's own storage would give the table. */
export const notesTable = 'create table if not exists migrations (name varchar(255) primary key)';
export const noteDone = 'insert into migrations (name) values (:name) on conflict do nothing';
export const noteUndone = 'delete from migrations where name = :name';

/**
 * A migration written as SQL, run in one transaction with the note that it was done: PostgreSQL undoes its own schema
 * changes, so a stop at any moment leaves it either done and noted, or neither.
 */
export function sqlMigration(sql: { up: string; down: string }): {
  up: MigrationFn<QueryInterface>;
  down: MigrationFn<QueryInterface>;
} {
  const run =
    (text: string, note: string): MigrationFn<QueryInterface> =>
    ({ context, name }) =>
      context.sequelize.transaction(async (transaction) => {
        await context.sequelize.query(text, { transaction });
        await context.sequelize.query(note, { transaction, replacements: { name } });
      });
  return { up: run(sql.up, noteDone), down: run(sql.down, noteUndone) };
}
