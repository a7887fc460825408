/** What the audit trail says of people and places. */
export const peopleAudit = {
  'people.audit.passwordReset': 'Password set anew',
  'people.audit.joined': '{name} joined',
  'people.audit.invited': '{email} invited',
  'people.audit.withdrawn': 'Invitation of {email} withdrawn',
  'people.audit.ended': 'Membership of {name} ended',
  'people.audit.property': 'Property changed',
} as const;
