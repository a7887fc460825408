import type { Sequelize } from 'sequelize';

import { Animal } from './animal';
import { AnimalImport } from './animalImport';
import { AuditEntry } from './auditEntry';
import { Authority } from './authority';
import { CalendarLink } from './calendarLink';
import { Cohort } from './cohort';
import { DeliveryAttempt } from './deliveryAttempt';
import { Engagement } from './engagement';
import { Enrolment } from './enrolment';
import { Group } from './group';
import { Invitation } from './invitation';
import { Membership } from './membership';
import { Message } from './message';
import { Organisation } from './organisation';
import { PasswordReset } from './passwordReset';
import { Product } from './product';
import { ProductBatch } from './productBatch';
import { Property } from './property';
import { Protocol } from './protocol';
import { ProtocolVersion } from './protocolVersion';
import { RecordStep } from './recordStep';
import { Task } from './task';
import { User } from './user';
import { WorkRecord } from './workRecord';

export {
  Animal,
  AnimalImport,
  AuditEntry,
  Authority,
  CalendarLink,
  Cohort,
  DeliveryAttempt,
  Engagement,
  Enrolment,
  Group,
  Invitation,
  Membership,
  Message,
  Organisation,
  PasswordReset,
  Product,
  ProductBatch,
  Property,
  Protocol,
  ProtocolVersion,
  RecordStep,
  Task,
  User,
  WorkRecord,
};

const all = [
  Animal,
  AnimalImport,
  AuditEntry,
  Authority,
  CalendarLink,
  Cohort,
  DeliveryAttempt,
  Engagement,
  Enrolment,
  Group,
  Invitation,
  Membership,
  Message,
  Organisation,
  PasswordReset,
  Product,
  ProductBatch,
  Property,
  Protocol,
  ProtocolVersion,
  RecordStep,
  Task,
  User,
  WorkRecord,
];

/** Binds every model to a database. Opening another database binds them to that one: one database a process. */
export function initModels(sequelize: Sequelize): void {
  for (const model of all) model.setup(sequelize);
}
