import type { JobContext } from '../context';

/** Writes that a worker is alive; the server's health and the start script read it. */
export async function beat({ deps }: JobContext): Promise<void> {
  await deps.sequelize.query(
    `insert into worker_beats (name, at) values ('worker', :now) on conflict (name) do update set at = excluded.at`,
    { replacements: { now: deps.now() } },
  );
}
