import type { APIRequestContext } from 'playwright-core';

import type { PlaceIds } from '../places';

interface Items {
  items: { id: string; state?: string; current?: { id: string } | null; next?: { taskId: string } | null }[];
}

/** Finds, as the demo's manager and vet, something to show in every place that shows one of many. */
export async function placeIds(base: string, manager: APIRequestContext, vet: APIRequestContext): Promise<PlaceIds> {
  const list = async (who: APIRequestContext, path: string) => {
    const answer = await who.get(`${base}${path}`);
    if (!answer.ok()) throw new Error(`${path}: ${answer.status()} ${await answer.text()}`);
    return ((await answer.json()) as Items).items;
  };
  const me = (await (await manager.get(`${base}/api/me`)).json()) as { properties: { id: string }[] };
  const propertyId = me.properties[0]?.id ?? '';
  const [cohorts, plans, protocols, library, animals] = await Promise.all([
    list(manager, '/api/cohorts'),
    list(vet, '/api/cohorts?state=planning'),
    list(vet, '/api/protocols'),
    list(vet, '/api/library'),
    list(manager, `/api/properties/${propertyId}/animals`),
  ]);
  const running = cohorts.find(({ next, state }) => next && state !== 'planning') ?? cohorts[0];
  const signedOff = protocols.find(({ current }) => current) ?? protocols[0];
  const ids = {
    cohortId: running?.id ?? '',
    planningCohortId: plans[0]?.id ?? '',
    taskId: running?.next?.taskId ?? '',
    protocolId: signedOff?.id ?? '',
    versionId: signedOff?.current?.id ?? '',
    libraryId: library[0]?.id ?? '',
    animalId: animals[0]?.id ?? '',
    propertyId,
  };
  const missing = Object.entries(ids).flatMap(([name, id]) => (id === '' ? [name] : []));
  if (missing.length > 0) throw new Error(`the demo data has nothing to show for ${missing.join(', ')}`);
  return ids;
}
