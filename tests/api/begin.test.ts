import { afterAll, beforeAll, describe, expect, it } from 'vitest';

import { Membership, Message, Organisation, Property, User } from '@/server/models';
import { loadActor } from '@/server/policies/loadActor';
import { begin, readBeginning } from '@/server/seeds/begin';
import { freshDatabase, type Fresh } from '../support/fresh-database';

const args = [
  ...['--practice', 'First Vets', '--vet-name', 'Vet', '--vet-email', 'Vet@First.example'],
  ...['--property', 'First Yards', '--zone', 'Australia/Sydney', '--country', 'au', '--region', 'NSW'],
  ...['--manager-name', 'Manager', '--manager-email', 'manager@first.example'],
];
let fresh: Fresh;
beforeAll(async () => {
  fresh = await freshDatabase();
});
afterAll(() => fresh.drop());

describe('the first practice and property of an installation', () => {
  it('names every option that is missing, and a zone that is none', () => {
    expect(() => readBeginning(['--practice', 'A'])).toThrow('--vet-name --vet-email --property');
    expect(() => readBeginning(args.map((arg) => (arg === 'Australia/Sydney' ? 'Moon/Sea' : arg)))).toThrow('Moon/Sea');
  });

  it('are there once, however often it is said, and both people get a link', async () => {
    await begin(fresh.deps, readBeginning(args));
    await begin(fresh.deps, readBeginning(args));
    expect([await Organisation.count(), await Property.count(), await User.count(), await Membership.count()]).toEqual([
      1, 1, 2, 2,
    ]);
    const mails = await Message.findAll({ where: { kind: 'passwordReset' } });
    expect(new Set(mails.map((mail) => mail.address))).toEqual(new Set(['vet@first.example', 'manager@first.example']));
  });

  it('give the vet the property through the practice', async () => {
    const vet = await User.findOne({ where: { email: 'vet@first.example' }, rejectOnEmpty: true });
    const actor = await loadActor(fresh.deps.pool, vet, fresh.deps.now());
    expect([...actor.properties.values()]).toEqual([{ roles: ['vet'], through: 'First Vets' }]);
  });
});
