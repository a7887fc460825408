import type { Role } from '@/shared/abilities';

export const demoPassword = 'yardbell-demo-2026';

/** Who can sign in to the demonstration. Everybody and every place is invented. */
export const demoPeople = [
  { key: 'vet', name: 'Maren Tolhurst', email: 'vet@quillback.example', role: 'vet', place: 'Quillback Vets' },
  { key: 'manager', name: 'Deke Farrant', email: 'manager@brindlegap.example', role: 'manager', place: 'Brindle Gap' },
  {
    key: 'technician',
    name: 'Ivo Lessing',
    email: 'technician@tallowback.example',
    role: 'technician',
    place: 'Tallowback AI',
  },
  { key: 'staff', name: 'Josie Pell', email: 'staff@brindlegap.example', role: 'staff', place: 'Brindle Gap' },
  {
    key: 'owner',
    name: 'Wynne Farrant',
    email: 'owner@brindlegap.example',
    role: 'calendarOnly',
    place: 'Brindle Gap',
  },
  { key: 'dairy', name: 'Cormac Teeling', email: 'manager@ballywhin.example', role: 'manager', place: 'Ballywhin' },
  { key: 'south', name: 'Rae Dunnick', email: 'manager@heronslough.example', role: 'manager', place: 'Heron Slough' },
] as const satisfies readonly { key: string; name: string; email: string; role: Role; place: string }[];

export type DemoKey = (typeof demoPeople)[number]['key'];

export const demoSignIns = demoPeople.map(({ email, role, place }) => ({ email, password: demoPassword, role, place }));
