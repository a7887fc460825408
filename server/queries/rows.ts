import { QueryTypes, type Transaction } from 'sequelize';

import type { Deps } from '../deps';

/**
 * Rows of a query with `$1` parameters: by the driver's pool, where speed counts, or inside a transaction, where what
 * is read must be what is written.
 */
export async function rows<Row extends object>(
  deps: Deps,
  text: string,
  values: readonly unknown[],
  transaction?: Transaction,
): Promise<Row[]> {
  if (!transaction) return (await deps.pool.query<Row & Record<string, unknown>>(text, [...values])).rows;
  return deps.sequelize.query<Row>(text, { bind: [...values], type: QueryTypes.SELECT, transaction });
}
