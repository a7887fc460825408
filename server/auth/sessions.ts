import { NodePostgresAdapter } from '@lucia-auth/adapter-postgresql';
import { Lucia, TimeSpan, type Adapter, type DatabaseSession } from 'lucia';
import type pg from 'pg';

import { hashSecret } from './secrets';

/**
 * lucia over PostgreSQL, with only the SHA-256 of a session id in the table: whoever copies the table can open no
 * session with it. The cookie holds the id itself.
 */
function hashedAdapter(pool: pg.Pool): Adapter {
  const inner = new NodePostgresAdapter(pool, { user: 'users', session: 'sessions' });
  const hashed = (session: DatabaseSession): DatabaseSession => ({ ...session, id: hashSecret(session.id) });
  return {
    getSessionAndUser: async (id) => {
      const [session, user] = await inner.getSessionAndUser(hashSecret(id));
      return [session && { ...session, id }, user];
    },
    getUserSessions: (userId) => inner.getUserSessions(userId),
    setSession: (session) => inner.setSession(hashed(session)),
    updateSessionExpiration: (id, expiresAt) => inner.updateSessionExpiration(hashSecret(id), expiresAt),
    deleteSession: (id) => inner.deleteSession(hashSecret(id)),
    deleteUserSessions: (userId) => inner.deleteUserSessions(userId),
    deleteExpiredSessions: () => inner.deleteExpiredSessions(),
  };
}

export function createLucia(pool: pg.Pool, production: boolean) {
  return new Lucia(hashedAdapter(pool), {
    sessionExpiresIn: new TimeSpan(30, 'd'),
    sessionCookie: {
      // the prefix makes browsers refuse the cookie unless it is secure, for this host and for every path
      name: production ? '__Host-yardbell' : 'yardbell',
      attributes: { secure: production, sameSite: 'lax', path: '/' },
    },
    getUserAttributes: (row) => ({ email: row.email, name: row.name }),
  });
}

export type Sessions = ReturnType<typeof createLucia>;

declare module 'lucia' {
  interface Register {
    Lucia: Sessions;
    DatabaseUserAttributes: { email: string; name: string };
  }
}
