import type { JobContext } from '../context';

const DAY = 86_400_000;
/** How long a spent row is of use to people who ask what happened. */
const KEPT = { invitations: 30 * DAY, messages: 90 * DAY };

/** Removes what has expired: sessions, password resets, invitations nobody took up, old messages with their attempts. */
export async function cleanUp({ deps }: JobContext): Promise<void> {
  const now = deps.now();
  const before = (age: number): Date => new Date(now.getTime() - age);
  const remove = (sql: string, moment: Date) => deps.sequelize.query(sql, { replacements: { moment } });
  await remove('delete from sessions where expires_at <= :moment', now);
  await remove('delete from password_resets where expires_at <= :moment', now);
  await remove('delete from invitations where accepted_at is null and expires_at <= :moment', before(KEPT.invitations));
  // by the moment it spoke of, not by its making: a plan is written long ahead, and a key must outlive its moment
  await remove(`delete from messages where state <> 'waiting' and due_at <= :moment`, before(KEPT.messages));
  // a link that wasn't mailed within a day is of no use to its reader; its secret shouldn't lie about
  await remove(
    `update messages set params = params - 'link' where state in ('failed', 'withdrawn') and params ->> 'link' is not null
       and updated_at <= :moment`,
    before(DAY),
  );
}
