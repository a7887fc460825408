/** Roles and what they may do: the one table that server policies, the generated route test and the client read. */

export const roles = ['vet', 'manager', 'technician', 'staff', 'calendarOnly'] as const;
export type Role = (typeof roles)[number];

/** Roles a person holds through an organisation (and so at every property that engages it), or at a property itself. */
export const organisationRoles = ['vet', 'technician'] as const satisfies readonly Role[];
export const propertyRoles = ['manager', 'staff', 'calendarOnly'] as const satisfies readonly Role[];

/**
 * ability -> roles that have it. Abilities named `protocol.*` and `product.*` are judged in an organisation,
 * all others at a property.
 */
export const abilities = {
  'property.read': ['vet', 'manager', 'technician', 'staff', 'calendarOnly'],
  'property.edit': ['manager'],
  'people.read': ['vet', 'manager'],
  'people.manage': ['manager'],
  'protocol.read': ['vet', 'manager', 'technician'],
  'protocol.edit': ['vet'],
  'protocol.signOff': ['vet'],
  'herd.read': ['vet', 'manager', 'technician', 'staff'],
  'herd.edit': ['manager'],
  'herd.import': ['manager'],
  'medicine.read': ['vet', 'manager', 'technician'],
  'medicine.edit': ['vet', 'manager'],
  'authority.write': ['vet'],
  'cohort.read': ['vet', 'manager', 'technician', 'staff'],
  'cohort.plan': ['vet', 'manager'],
  'cohort.start': ['manager'],
  'cohort.cancel': ['manager'],
  'task.move': ['vet', 'manager'],
  'work.read': ['vet', 'manager', 'technician', 'staff'],
  'work.record': ['vet', 'manager', 'technician', 'staff'],
  'calendar.read': ['vet', 'manager', 'technician', 'staff', 'calendarOnly'],
  'audit.read': ['vet', 'manager'],
} as const satisfies Record<string, readonly Role[]>;

export type Ability = keyof typeof abilities;

/** True when any of the roles has the ability. */
export const may = (held: readonly Role[], ability: Ability): boolean =>
  held.some((role) => (abilities[ability] as readonly Role[]).includes(role));

/** All abilities of a set of roles: what travels to the client with a property or organisation. */
export const abilitiesOf = (held: readonly Role[]): Ability[] =>
  (Object.keys(abilities) as Ability[]).filter((ability) => may(held, ability));
