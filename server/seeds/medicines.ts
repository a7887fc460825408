import { addDays } from '@/protocols/time/dates';
import type { Active, AdministrationRoute, AnimalClass, DoseUnit, LocalDate } from '@/protocols/types';
import { Authority, Product, ProductBatch } from '../models';
import { demoId } from './ids';
import { personId, practiceId } from './places';

const products = [
  {
    name: 'Dinoprost 5 mg/mL',
    active: 'dinoprost',
    strength: 5,
    unit: 'mg',
    per: 'mL',
    packSize: 100,
    route: 'im',
    meatDays: null,
    milkHours: null,
    openDays: 28,
  },
  {
    name: 'Gonadorelin 50 µg/mL',
    active: 'gonadorelin',
    strength: 50,
    unit: 'ug',
    per: 'mL',
    packSize: 50,
    route: 'im',
    meatDays: null,
    milkHours: null,
    openDays: 28,
  },
  {
    name: 'Progesterone device',
    active: 'progesterone',
    strength: 1,
    unit: 'device',
    per: 'piece',
    packSize: 10,
    route: 'intravaginal',
    meatDays: null,
    milkHours: null,
    openDays: null,
  },
] as const;

const productId = (name: string) => demoId(`product ${name}`);

/** Products of the practice and product batches at a property; one near its expiry. */
export async function seedMedicines(propertyId: string, today: LocalDate, first: boolean): Promise<void> {
  for (const [i, product] of products.entries()) {
    if (first) await Product.create({ id: productId(product.name), organisationId: practiceId, ...product });
    await ProductBatch.create({
      id: demoId(`batch ${propertyId} ${product.name}`),
      propertyId,
      productId: productId(product.name),
      number: `Y${4180 + i}`,
      expiry: addDays(today, i === 1 ? 9 : 300 + i),
      quantity: product.packSize * (i === 2 ? 18 : 10),
    });
  }
}

const dose: Partial<Record<Active, { amount: number; unit: DoseUnit; route: AdministrationRoute }>> = {
  dinoprost: { amount: 25, unit: 'mg', route: 'im' },
  gonadorelin: { amount: 100, unit: 'ug', route: 'im' },
  progesterone: { amount: 1, unit: 'device', route: 'intravaginal' },
};

/** The vet's written directions for a cohort. */
export async function seedAuthorities(input: {
  propertyId: string;
  cohortId: string;
  class: AnimalClass;
  heads: Partial<Record<Active, number>>;
  from: LocalDate;
  to: LocalDate;
  issuedAt: Date;
}): Promise<void> {
  for (const [active, head] of Object.entries(input.heads) as [Active, number][]) {
    const each = dose[active];
    if (!each) continue;
    const product = products.find((p) => p.active === active);
    await Authority.create({
      id: demoId(`authority ${input.cohortId} ${active}`),
      propertyId: input.propertyId,
      cohortId: input.cohortId,
      organisationId: practiceId,
      active,
      productId: product ? productId(product.name) : null,
      ...each,
      classes: [input.class],
      head,
      validFrom: input.from,
      validTo: input.to,
      meatDays: 0,
      milkHours: 0,
      directions: 'As the protocol says. Keep the label with the kit.',
      issuedBy: personId('vet'),
      issuedAt: input.issuedAt,
    });
  }
}
