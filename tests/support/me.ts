import { abilitiesOf, type Role } from '@/shared/abilities';
import type { Me } from '@/shared/contracts/people';

export const brindleGap = '11111111-1111-4111-8111-111111111111';
export const ballywhin = '22222222-2222-4222-8222-222222222222';

const place = (id: string, name: string, zone: string, country: string, roles: Role[]): Me['properties'][number] => ({
  id,
  name,
  zone,
  country,
  locale: `en-${country}`,
  roles,
  abilities: abilitiesOf(roles),
  through: null,
});

/** A person with a role at one property, or at both. */
export const person = (role: Role, both = false): Me => ({
  user: { id: '33333333-3333-4333-8333-333333333333', name: 'Mara Field', email: 'mara@example.org' },
  preferences: { evening: true, morning: false, closing: true, eveningAt: '18:00', morningAt: '05:30' },
  organisations: [],
  properties: [
    place(brindleGap, 'Brindle Gap', 'Australia/Sydney', 'AU', [role]),
    ...(both ? [place(ballywhin, 'Ballywhin', 'Europe/Dublin', 'IE', [role])] : []),
  ],
});
