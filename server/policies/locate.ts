import type pg from 'pg';

import type { OwnedParam } from '@/shared/routes/spec';
import type { Place } from '../http/handler';

/** For every id that a route may name: the query that finds whose it is. */
const owners: Record<OwnedParam, string> = {
  propertyId: 'select id as property_id, null::uuid as organisation_id from properties where id = $1',
  organisationId: 'select null::uuid as property_id, id as organisation_id from organisations where id = $1',
  cohortId: 'select property_id, null::uuid as organisation_id from cohorts where id = $1',
  taskId: 'select property_id, null::uuid as organisation_id from tasks where id = $1',
  animalId: 'select property_id, null::uuid as organisation_id from animals where id = $1',
  recordId: 'select property_id, null::uuid as organisation_id from records where id = $1',
  authorityId: 'select property_id, null::uuid as organisation_id from authorities where id = $1',
  membershipId: 'select property_id, organisation_id from memberships where id = $1 and ended_at is null',
  invitationId:
    'select property_id, organisation_id from invitations where id = $1 and accepted_at is null and withdrawn_at is null',
  protocolId: `select null::uuid as property_id, p.organisation_id, exists (
      select from protocol_versions v where v.protocol_id = p.id and v.state <> 'workingCopy') as signed_off
    from protocols p where p.id = $1`,
  versionId: `select null::uuid as property_id, p.organisation_id, v.state <> 'workingCopy' as signed_off
    from protocol_versions v join protocols p on p.id = v.protocol_id where v.id = $1`,
};

export interface Located extends Place {
  /** For a version, and for a protocol by any of its versions: whether people outside its organisation may read it. */
  signedOff?: boolean;
}

interface Row {
  property_id: string | null;
  organisation_id: string | null;
  signed_off?: boolean;
}

/** The owner of an id; null when there is no such record. */
export async function locate(pool: pg.Pool, param: OwnedParam, id: string): Promise<Located | null> {
  const { rows } = await pool.query<Row>({ name: `locate-${param}`, text: owners[param], values: [id] });
  const row = rows[0];
  if (!row) return null;
  return {
    ...(row.property_id ? { propertyId: row.property_id } : {}),
    ...(row.organisation_id ? { organisationId: row.organisation_id } : {}),
    ...(row.signed_off === undefined ? {} : { signedOff: row.signed_off }),
  };
}
