import { localDate } from '@/protocols/time/zoned';
import { t } from '@/shared/messages';
import type { Input } from '@/shared/routes';
import { audit } from '../audit';
import type { Deps } from '../deps';
import { AppError, failure } from '../http/errors';
import { Animal, Property } from '../models';
import type { Actor } from '../policies/actor';

type Patch = Input<'PATCH /api/animals/:animalId'>['body'];

/** Dates of an animal that can't be: each named. */
function badDates(animal: Animal, patch: Patch, today: string): { path: string; message: string }[] {
  const after = { birth: animal.birth, lastCalving: animal.lastCalving, lastService: animal.lastService, ...patch };
  const fields = (['birth', 'lastCalving', 'lastService'] as const).flatMap((path) => {
    const value = after[path];
    return value && value > today ? [{ path, message: t('server.animal.future') }] : [];
  });
  if (after.birth && after.lastCalving && after.lastCalving <= after.birth)
    fields.push({ path: 'lastCalving', message: t('server.animal.calvedBeforeBirth') });
  return fields;
}

/** Changes an animal: absent leaves, null clears. */
export async function patchAnimal(deps: Deps, actor: Actor, id: string, patch: Patch): Promise<void> {
  await deps.sequelize.transaction(async (transaction) => {
    const animal = await Animal.findByPk(id, { transaction, lock: transaction.LOCK.UPDATE, rejectOnEmpty: true });
    if (animal.state === 'left') throw failure('refused', 'server.animal.left');
    const property = await Property.findByPk(animal.propertyId, { transaction, rejectOnEmpty: true });
    const fields = badDates(animal, patch, localDate(deps.now().getTime(), property.zone));
    if (fields.length > 0) throw new AppError('invalid', t('server.invalid'), fields);
    const values = Object.fromEntries(Object.entries(patch).filter(([, value]) => value !== undefined));
    await animal.update({ ...values, updatedAt: deps.now() }, { transaction });
    await audit(transaction, {
      at: deps.now(),
      userId: actor.userId,
      propertyId: animal.propertyId,
      action: 'animal.change',
      summary: t('herd.audit.changed', { tag: animal.tag }),
      detail: { animalId: id, ...values },
    });
  });
}
