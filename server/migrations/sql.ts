import type { QueryInterface } from 'sequelize';
import type { MigrationFn } from 'umzug';

/**
 * A migration written as SQL, run in one transaction: PostgreSQL undoes its own schema changes, so a stop in the
 * middle leaves nothing half done.
 */
export function sqlMigration(sql: { up: string; down: string }): {
  up: MigrationFn<QueryInterface>;
  down: MigrationFn<QueryInterface>;
} {
  const run =
    (text: string): MigrationFn<QueryInterface> =>
    ({ context }) =>
      context.sequelize.transaction(async (transaction) => {
        await context.sequelize.query(text, { transaction });
      });
  return { up: run(sql.up), down: run(sql.down) };
}
