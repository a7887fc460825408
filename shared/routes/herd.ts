import { z } from 'zod';

import * as c from '../contracts/common';
import * as h from '../contracts/herd';
import * as m from '../contracts/medicines';
import { part } from './spec';

const property = z.object({ propertyId: c.id });
const animal = z.object({ animalId: c.id });

export const herdRoutes = part({
  'GET /api/properties/:propertyId/animals': {
    summary: 'Animals of a property, by tag',
    who: { ability: 'herd.read', at: 'propertyId' },
    params: property,
    query: h.animalQuery,
    output: c.page(h.animal),
  },
  'POST /api/properties/:propertyId/animal-imports/preview': {
    summary: 'Row by row, what an import would create, update, skip and refuse; nothing is written',
    who: { ability: 'herd.import', at: 'propertyId' },
    limit: 'upload',
    params: property,
    body: h.importRequest,
    output: h.importPreview,
  },
  'POST /api/properties/:propertyId/animal-imports': {
    summary: 'Import animals in one transaction',
    who: { ability: 'herd.import', at: 'propertyId' },
    limit: 'upload',
    params: property,
    body: h.importRequest,
    output: h.importResult,
    status: 201,
  },
  'GET /api/animals/:animalId': {
    summary: 'An animal and its history',
    who: { ability: 'herd.read', at: 'animalId' },
    params: animal,
    output: h.animalDetail,
  },
  'PATCH /api/animals/:animalId': {
    summary: 'Change an animal: absent leaves, null clears',
    who: { ability: 'herd.edit', at: 'animalId' },
    params: animal,
    body: h.animalPatch,
    output: h.animalDetail,
  },
  'GET /api/properties/:propertyId/medicines': {
    summary: 'Products, product batches and authorities in use at a property',
    who: { ability: 'medicine.read', at: 'propertyId' },
    params: property,
    output: m.medicines,
  },
  'POST /api/properties/:propertyId/products': {
    summary: 'Add a product of an engaged organisation',
    who: { ability: 'medicine.edit', at: 'propertyId' },
    params: property,
    body: m.productCreate,
    output: m.product,
    status: 201,
  },
  'POST /api/properties/:propertyId/product-batches': {
    summary: 'Add a product batch with its expiry',
    who: { ability: 'medicine.edit', at: 'propertyId' },
    params: property,
    body: m.productBatchCreate,
    output: m.productBatch,
    status: 201,
  },
  'POST /api/cohorts/:cohortId/authorities': {
    summary: 'Authorise a medicine for a cohort',
    who: { ability: 'authority.write', at: 'cohortId' },
    params: z.object({ cohortId: c.id }),
    body: m.authorityCreate,
    output: m.authority,
    status: 201,
  },
  'POST /api/authorities/:authorityId/withdraw': {
    summary: 'Withdraw an authority from now on',
    who: { ability: 'authority.write', at: 'authorityId' },
    params: z.object({ authorityId: c.id }),
    output: m.authority,
  },
});
