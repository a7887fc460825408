import type { Transaction } from 'sequelize';

import type { Deps } from '../deps';
import type { AuthorityUse } from '../queries/authorityUse';
import { rows } from '../queries/rows';
import { liveRecords } from '../queries/tasks';

/** One dose given: to an animal, or to a number of head without ids. */
export interface Given {
  animalId: string | null;
  head: number;
  groupId: string;
  /** Task, step and item: the same act goes on under one name. */
  act: string;
}

/** What is left of each authority while a request is being written. */
export interface Balances {
  /** Counts a dose against an authority; false, and nothing counted, when it has no head left for it. */
  take(authority: AuthorityUse, given: Given): boolean;
}

interface Balance {
  animals: Set<string>;
  /** Head of each act, by group. */
  groups: Map<string, Map<string, number>>;
}

/**
 * Head is animals, not doses: an animal counts once however often it gets the medicine, and a group without ids
 * counts as many head as the largest of its acts (the same reading as `authorityUse`).
 */
export async function readBalances(
  deps: Deps,
  authorities: readonly AuthorityUse[],
  tx: Transaction,
): Promise<Balances> {
  const found = await rows<Given & { authorityId: string }>(
    deps,
    `select s.authority_id as "authorityId", r.animal_id as "animalId", t.group_id as "groupId",
        r.task_id || ' ' || s.step_id || ' ' || s.item as act, sum(r.head)::int as head
      from tasks t join records r on r.task_id = t.id join record_steps s on s.record_id = r.id
      where t.property_id in (select property_id from authorities where id = any($1::uuid[]))
        and s.authority_id = any($1::uuid[]) and s.outcome = 'done' and ${liveRecords('r')}
      group by s.authority_id, r.animal_id, t.group_id, r.task_id, s.step_id, s.item`,
    [authorities.map((authority) => authority.id)],
    tx,
  );
  const balances = new Map<string, Balance>(
    authorities.map((authority) => [authority.id, { animals: new Set(), groups: new Map() }]),
  );
  for (const given of found) count(balances.get(given.authorityId), given);
  return {
    take(authority, given) {
      const balance = balances.get(authority.id);
      if (!balance || usedWith(balance, given) > authority.head) return false;
      count(balance, given);
      return true;
    },
  };
}

const headOf = (acts: ReadonlyMap<string, number>): number => Math.max(0, ...acts.values());

function usedWith(balance: Balance, given: Given): number {
  const counted = [...balance.groups.values()].reduce((sum, acts) => sum + headOf(acts), balance.animals.size);
  if (given.animalId !== null) return counted + (balance.animals.has(given.animalId) ? 0 : 1);
  const acts = balance.groups.get(given.groupId) ?? new Map<string, number>();
  const before = headOf(acts);
  return counted - before + Math.max(before, (acts.get(given.act) ?? 0) + given.head);
}

function count(balance: Balance | undefined, given: Given): void {
  if (!balance) return;
  if (given.animalId !== null) {
    balance.animals.add(given.animalId);
    return;
  }
  const acts = balance.groups.get(given.groupId) ?? new Map<string, number>();
  acts.set(given.act, (acts.get(given.act) ?? 0) + given.head);
  balance.groups.set(given.groupId, acts);
}
