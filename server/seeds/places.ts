import { hashPassword } from '../auth/password';
import { Engagement, Membership, Organisation, Property, User } from '../models';
import { demoId } from './ids';
import { demoPassword, demoPeople, type DemoKey } from './signIns';

export const practiceId = demoId('Quillback Vets');
export const contractorId = demoId('Tallowback AI');
export const brindleGap = {
  id: demoId('Brindle Gap'),
  name: 'Brindle Gap',
  zone: 'Australia/Sydney',
  country: 'AU',
  region: 'NSW',
  locale: 'en-AU',
  latitude: -33.6,
  longitude: 149.6,
  yardFrom: '05:00',
  yardTo: '20:00',
};
export const ballywhin = {
  id: demoId('Ballywhin'),
  name: 'Ballywhin',
  zone: 'Europe/Dublin',
  country: 'IE',
  region: null,
  locale: 'en-IE',
  latitude: 52.3,
  longitude: -8.1,
  yardFrom: '06:00',
  yardTo: '20:00',
  milkings: ['06:30', '16:30'],
};
export const heronSlough = {
  id: demoId('Heron Slough'),
  name: 'Heron Slough',
  zone: 'America/New_York',
  country: 'US',
  region: 'FL',
  locale: 'en-US',
  latitude: 27.6,
  longitude: -81.3,
  yardFrom: '06:00',
  yardTo: '19:00',
};

export const personId = (key: DemoKey): string => demoId(`person ${key}`);

const memberOf: Record<DemoKey, { organisationId?: string; propertyId?: string }> = {
  vet: { organisationId: practiceId },
  technician: { organisationId: contractorId },
  manager: { propertyId: brindleGap.id },
  staff: { propertyId: brindleGap.id },
  owner: { propertyId: brindleGap.id },
  dairy: { propertyId: ballywhin.id },
  south: { propertyId: heronSlough.id },
};

/** Organisations, properties, engagements and people of the demonstration. */
export async function seedPlaces(): Promise<void> {
  await Organisation.create({ id: practiceId, name: 'Quillback Vets', kind: 'vetPractice' });
  await Organisation.create({ id: contractorId, name: 'Tallowback AI', kind: 'aiContractor' });
  for (const place of [brindleGap, ballywhin, heronSlough]) {
    await Property.create(place);
    await Engagement.create({
      id: demoId(`vet at ${place.name}`),
      organisationId: practiceId,
      propertyId: place.id,
      scope: 'veterinary',
      fromDate: '2024-01-01',
    });
  }
  await Engagement.create({
    id: demoId('ai at Brindle Gap'),
    organisationId: contractorId,
    propertyId: brindleGap.id,
    scope: 'insemination',
    fromDate: '2024-01-01',
  });
  const passwordHash = await hashPassword(demoPassword);
  for (const person of demoPeople) {
    await User.create({ id: personId(person.key), email: person.email, name: person.name, passwordHash });
    await Membership.create({
      id: demoId(`member ${person.key}`),
      userId: personId(person.key),
      role: person.role,
      organisationId: null,
      propertyId: null,
      ...memberOf[person.key],
    });
  }
}
