import { patchAnimal } from '../commands/animals';
import { importAnimals, previewImport } from '../commands/importAnimals';
import { createBatch, createProduct, issueAuthority, withdrawAuthority } from '../commands/medicines';
import type { Handlers } from '../http/handler';
import { listAnimals, readAnimal } from '../queries/animals';
import { presentProduct, readAuthority, readBatch, readMedicines } from '../queries/medicines';
import { signedIn } from './people';

/** Animals and their import, medicines and authorities. */
export const herdHandlers: Handlers<
  | 'GET /api/properties/:propertyId/animals'
  | 'POST /api/properties/:propertyId/animal-imports/preview'
  | 'POST /api/properties/:propertyId/animal-imports'
  | 'GET /api/animals/:animalId'
  | 'PATCH /api/animals/:animalId'
  | 'GET /api/properties/:propertyId/medicines'
  | 'POST /api/properties/:propertyId/products'
  | 'POST /api/properties/:propertyId/product-batches'
  | 'POST /api/cohorts/:cohortId/authorities'
  | 'POST /api/authorities/:authorityId/withdraw'
> = {
  'GET /api/properties/:propertyId/animals': ({ input, deps }) =>
    listAnimals(deps, input.params.propertyId, input.query),
  'POST /api/properties/:propertyId/animal-imports/preview': ({ input, deps }) =>
    previewImport(deps, input.params.propertyId, input.body),
  'POST /api/properties/:propertyId/animal-imports': ({ actor, input, deps }) =>
    importAnimals(deps, signedIn(actor), input.params.propertyId, input.body),
  'GET /api/animals/:animalId': ({ input, deps }) => readAnimal(deps, input.params.animalId),
  'PATCH /api/animals/:animalId': async ({ actor, input, deps }) => {
    await patchAnimal(deps, signedIn(actor), input.params.animalId, input.body);
    return readAnimal(deps, input.params.animalId);
  },
  'GET /api/properties/:propertyId/medicines': ({ input, deps }) => readMedicines(deps, input.params.propertyId),
  'POST /api/properties/:propertyId/products': async ({ actor, input, deps }) =>
    presentProduct(await createProduct(deps, signedIn(actor), input.params.propertyId, input.body)),
  'POST /api/properties/:propertyId/product-batches': async ({ actor, input, deps }) => {
    const id = await createBatch(deps, signedIn(actor), input.params.propertyId, input.body);
    return readBatch(deps, input.params.propertyId, id);
  },
  'POST /api/cohorts/:cohortId/authorities': async ({ actor, input, deps }) => {
    await issueAuthority(deps, signedIn(actor), input.params.cohortId, input.body);
    return readAuthority(deps, input.body.id);
  },
  'POST /api/authorities/:authorityId/withdraw': async ({ actor, input, deps }) => {
    await withdrawAuthority(deps, signedIn(actor), input.params.authorityId);
    return readAuthority(deps, input.params.authorityId);
  },
};
