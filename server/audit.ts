import { randomUUID } from 'node:crypto';

import type { Transaction } from 'sequelize';

import { AuditEntry } from './models';

export interface Audit {
  at?: Date;
  userId: string | null;
  propertyId?: string | null;
  organisationId?: string | null;
  cohortId?: string | null;
  /** Stable name of what was done, such as `task.move`. */
  action: string;
  /** A sentence for people. */
  summary: string;
  detail?: Record<string, unknown>;
}

/** Writes an audit entry in the transaction of the change that it tells of: one is never without the other. */
export async function audit(transaction: Transaction, entry: Audit): Promise<void> {
  await AuditEntry.create(
    {
      id: randomUUID(),
      userId: entry.userId,
      propertyId: entry.propertyId ?? null,
      organisationId: entry.organisationId ?? null,
      cohortId: entry.cohortId ?? null,
      action: entry.action,
      summary: entry.summary,
      detail: entry.detail ?? {},
      ...(entry.at ? { at: entry.at } : {}),
    },
    { transaction },
  );
}
