import type { Role } from '@/shared/abilities';

/** The person signed in, with every role they hold now, worked out anew for each request. */
export interface Actor {
  userId: string;
  name: string;
  email: string;
  /** Roles at each property: by own membership, or through an organisation whose engagement is in force. */
  properties: ReadonlyMap<string, { roles: readonly Role[]; through: string | null }>;
  organisations: ReadonlyMap<string, readonly Role[]>;
}
