import { addDays } from '@/protocols/time/dates';
import { localDate } from '@/protocols/time/zoned';
import type { Output } from '@/shared/routes';
import type { Deps } from '../deps';
import { holidaysOf } from '../holidays';
import type { Actor } from '../policies/actor';
import { propertiesWith } from '../policies/authorise';
import { presentTask } from '../presenters/tasks';
import { rows } from './rows';
import { tasksWhere, type TaskRow } from './tasks';

interface Place {
  id: string;
  name: string;
  zone: string;
  country: string;
  region: string | null;
}

const placesOf = (deps: Deps, ids: readonly string[]): Promise<Place[]> =>
  rows<Place>(deps, 'select id, name, zone, country, region from properties where id = any($1) order by name, id', [
    ids,
  ]);

const allowed = (actor: Actor, ability: 'work.read' | 'calendar.read', propertyId: string | undefined): string[] =>
  propertiesWith(actor, ability).filter((id) => propertyId === undefined || id === propertyId);

const isOpen = (task: TaskRow) => task.state === 'planned' || task.state === 'inWork';

/** Day and a half: no zone is further from UTC, so the query reaches every local today. */
const reach = 38 * 3_600_000;

/**
 * Today at every property of the person: what is overdue first (its window has ended, or its day is past), then the
 * tasks of the local day in order of time, and the next one after that.
 */
export async function readToday(
  deps: Deps,
  actor: Actor,
  query: { date?: string | undefined; propertyId?: string | undefined },
): Promise<Output<'GET /api/today'>> {
  const now = deps.now();
  const ids = allowed(actor, 'work.read', query.propertyId);
  const middle = query.date ? Date.parse(`${query.date}T12:00:00Z`) : now.getTime();
  const [places, tasks, next] = await Promise.all([
    placesOf(deps, ids),
    tasksWhere(
      deps,
      `t.property_id = any($1) and c.state in ('running', 'finished') and t.state <> 'cancelled'
        and t.due_at < $3 and (t.due_at > $2 or t.state in ('planned', 'inWork'))`,
      [ids, new Date(middle - reach), new Date(middle + reach)],
    ),
    tasksWhere(
      deps,
      `t.id in (select distinct on (n.property_id) n.id from tasks n join cohorts nc on nc.id = n.cohort_id
        where n.property_id = any($1) and nc.state = 'running' and n.state in ('planned', 'inWork')
          and n.due_at >= (coalesce($3::date, ($2::timestamptz at time zone n.zone)::date) + 1)::timestamp at time zone n.zone
        order by n.property_id, n.due_at)`,
      [ids, now, query.date ?? null],
    ),
  ]);
  return {
    now: now.toISOString(),
    properties: places.map((place) => {
      const date = query.date ?? localDate(now.getTime(), place.zone);
      const here = tasks.filter((task) => task.propertyId === place.id);
      const dayOf = (task: TaskRow) => localDate(task.dueAt.getTime(), place.zone);
      const isOverdue = (task: TaskRow) => isOpen(task) && (task.windowTo < now || dayOf(task) < date);
      const upcoming = next.find((task) => task.propertyId === place.id);
      return {
        propertyId: place.id,
        property: place.name,
        zone: place.zone,
        date,
        overdue: here.filter(isOverdue).map(presentTask),
        tasks: here.filter((task) => dayOf(task) === date && !isOverdue(task)).map(presentTask),
        next: upcoming ? presentTask(upcoming) : null,
      };
    }),
  };
}

const mostDays = 400;

/** Tasks and holidays between two local dates, both included. */
export async function readCalendar(
  deps: Deps,
  actor: Actor,
  query: { from: string; to: string; propertyId?: string | undefined },
): Promise<Output<'GET /api/calendar'>> {
  const ids = allowed(actor, 'calendar.read', query.propertyId);
  const places = await placesOf(deps, ids);
  const to = query.to < addDays(query.from, mostDays) ? query.to : addDays(query.from, mostDays);
  const tasks = await tasksWhere(
    deps,
    `t.property_id = any($1) and c.state in ('running', 'finished') and t.state <> 'cancelled'
      and (t.due_at at time zone t.zone)::date between $2::date and $3::date`,
    [ids, query.from, to],
  );
  const [first, last] = [Number(query.from.slice(0, 4)), Number(to.slice(0, 4))];
  const years = Array.from({ length: Math.max(0, last - first + 1) }, (_, i) => first + i);
  const holidays = await Promise.all(
    places.map(async (place) =>
      (await holidaysOf(place.country, place.region, years))
        .filter((holiday) => holiday.date >= query.from && holiday.date <= to)
        .map((holiday) => ({ propertyId: place.id, ...holiday })),
    ),
  );
  return { tasks: tasks.map(presentTask), holidays: holidays.flat() };
}
