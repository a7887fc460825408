import { randomUUID } from 'node:crypto';
import { parseArgs } from 'node:util';

import { pino } from 'pino';

import { askPasswordReset } from '../commands/account';
import { hashPassword } from '../auth/password';
import { newSecret } from '../auth/secrets';
import { openDb } from '../db';
import type { Deps } from '../deps';
import { loadEnv } from '../env';
import { migrate } from '../migrate';
import { Engagement, Membership, Organisation, Property, User } from '../models';

/** The first practice and property of a real installation, each with one person; everybody else is invited by them. */
export interface Beginning {
  practice: string;
  vet: { name: string; email: string };
  property: string;
  zone: string;
  country: string;
  region?: string;
  locale: string;
  manager: { name: string; email: string };
}

/**
 * Writes a practice, a property that engages it, a vet and a manager, in one transaction, and asks for a password
 * link for both: the worker mails it. A practice or property of that name that is there already is used.
 */
export async function begin(deps: Deps, input: Beginning): Promise<void> {
  const passwordHash = await hashPassword(newSecret());
  const today = deps.now().toISOString().slice(0, 10);
  await deps.sequelize.transaction(async (transaction) => {
    const id = randomUUID;
    const [practice] = await Organisation.findOrCreate({
      where: { name: input.practice },
      defaults: { id: id(), name: input.practice, kind: 'vetPractice' },
      transaction,
    });
    const { zone, country, locale, region = null } = input;
    const [property] = await Property.findOrCreate({
      where: { name: input.property },
      defaults: { id: id(), name: input.property, zone, country, region, locale },
      transaction,
    });
    const engaged = { organisationId: practice.id, propertyId: property.id, scope: 'veterinary' as const };
    await Engagement.findOrCreate({ where: engaged, defaults: { id: id(), ...engaged, fromDate: today }, transaction });
    for (const [who, role, place] of [
      [input.vet, 'vet', { organisationId: practice.id, propertyId: null }],
      [input.manager, 'manager', { organisationId: null, propertyId: property.id }],
    ] as const) {
      const email = who.email.toLowerCase();
      const [user] = await User.findOrCreate({
        where: { email },
        defaults: { id: id(), email, name: who.name, passwordHash },
        transaction,
      });
      const membership = { userId: user.id, role, ...place, endedAt: null };
      await Membership.findOrCreate({ where: membership, defaults: { id: id(), ...membership }, transaction });
    }
  });
  for (const who of [input.vet, input.manager]) await askPasswordReset(deps, who.email.toLowerCase());
}

const needed = [
  'practice',
  'vet-name',
  'vet-email',
  'property',
  'zone',
  'country',
  'manager-name',
  'manager-email',
] as const;

/** Reads the command line; an option that is missing is named. */
export function readBeginning(args: readonly string[]): Beginning {
  const text = { type: 'string' } as const;
  const options = Object.fromEntries([...needed, 'region', 'locale'].map((name) => [name, text]));
  const { values } = parseArgs({ args: [...args], options });
  const missing = needed.filter((name) => !values[name]);
  if (missing.length > 0) throw new Error(`Say also: ${missing.map((name) => `--${name}`).join(' ')}`);
  const value = (name: string): string => String(values[name] ?? '');
  return {
    practice: value('practice'),
    vet: { name: value('vet-name'), email: value('vet-email') },
    property: value('property'),
    zone: new Intl.DateTimeFormat('en', { timeZone: value('zone') }).resolvedOptions().timeZone,
    country: value('country').toUpperCase(),
    ...(values.region ? { region: value('region') } : {}),
    locale: value('locale') || 'en-AU',
    manager: { name: value('manager-name'), email: value('manager-email') },
  };
}

/** The command `npm run begin`. */
export async function runBegin(args: readonly string[]): Promise<void> {
  const input = readBeginning(args);
  const env = loadEnv();
  const db = openDb(env.DATABASE_URL);
  await migrate(db.sequelize);
  const deps = {
    env,
    sequelize: db.sequelize,
    pool: db.pool,
    log: pino({ level: env.LOG_LEVEL }),
    now: () => new Date(),
  };
  await begin(deps, input).finally(() => db.close());
  console.log(`${input.practice} and ${input.property} are there. The worker mails a password link to both people.`);
}
