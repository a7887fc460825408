import type { Authority } from '@/shared/contracts/medicines';
import type { Output } from '@/shared/routes';
import type { Deps } from '../deps';
import { failure } from '../http/errors';
import { Authority as AuthorityRecord, type Product } from '../models';
import { presentAuthority } from '../presenters/plans';
import { authoritiesOf } from './authorityUse';
import { rows } from './rows';

type Medicines = Output<'GET /api/properties/:propertyId/medicines'>;
type ProductView = Medicines['products'][number];
type BatchView = Medicines['batches'][number];

export const presentProduct = (product: Product): ProductView => ({
  id: product.id,
  organisationId: product.organisationId,
  name: product.name,
  active: product.active,
  strength: product.strength,
  unit: product.unit,
  per: product.per,
  packSize: product.packSize,
  route: product.route,
  meatDays: product.meatDays,
  milkHours: product.milkHours,
  openDays: product.openDays,
});

const productSql = `
  select distinct p.id, p.organisation_id as "organisationId", p.name, p.active, p.strength, p.unit, p.per,
    p.pack_size as "packSize", p.route, p.meat_days as "meatDays", p.milk_hours as "milkHours", p.open_days as "openDays"
  from products p join engagements e on e.organisation_id = p.organisation_id join properties f on f.id = e.property_id
  where e.property_id = $1 and e.from_date <= ($2::timestamptz at time zone f.zone)::date
    and (e.to_date is null or e.to_date >= ($2::timestamptz at time zone f.zone)::date) order by p.name`;

/** Used: amounts recorded, in the product's own unit (millilitres, pieces), taken-back records left out. */
const batchSql = `
  select b.id, b.product_id as "productId", p.name as product, b.number, b.expiry, b.quantity,
    b.broached_at as "broachedAt", coalesce((select sum(s.amount * r.head) / p.strength from record_steps s
      join records r on r.id = s.record_id where s.product_batch_id = b.id and s.outcome = 'done'
      and not exists (select 1 from records u where u.corrects_id = r.id)), 0)::float8 as used
  from product_batches b join products p on p.id = b.product_id where b.property_id = $1 and ($2::uuid is null or b.id = $2)
  order by b.expiry, p.name`;

const batchesOf = async (deps: Deps, propertyId: string, id: string | null): Promise<BatchView[]> =>
  (await rows<Omit<BatchView, 'broachedAt'> & { broachedAt: Date | null }>(deps, batchSql, [propertyId, id])).map(
    (row) => ({
      ...row,
      broachedAt: row.broachedAt?.toISOString() ?? null,
    }),
  );

/** Products of engaged organisations, product batches at the property, and every authority. */
export async function readMedicines(deps: Deps, propertyId: string): Promise<Medicines> {
  const [products, batches, authorities] = await Promise.all([
    rows<ProductView>(deps, productSql, [propertyId, deps.now()]),
    batchesOf(deps, propertyId, null),
    authoritiesOf(deps, propertyId, null),
  ]);
  return {
    products,
    batches,
    authorities: authorities.map((authority) => presentAuthority(authority, propertyId)).reverse(),
  };
}

export async function readBatch(deps: Deps, propertyId: string, id: string): Promise<BatchView> {
  const [batch] = await batchesOf(deps, propertyId, id);
  if (!batch) throw failure('notFound', 'server.notFound');
  return batch;
}

export async function readAuthority(deps: Deps, id: string): Promise<Authority> {
  const record = await AuthorityRecord.findByPk(id);
  const all = record ? await authoritiesOf(deps, record.propertyId, null) : [];
  const found = all.find((authority) => authority.id === id);
  if (!record || !found) throw failure('notFound', 'server.notFound');
  return presentAuthority(found, record.propertyId);
}
