import { sqlMigration } from './sql';

/** Cohorts, groups, tasks, authorities and the records of work. */
export const { up, down } = sqlMigration({
  up: `
create table cohorts (
  id uuid primary key,
  property_id uuid not null references properties (id),
  name text not null check (length(trim(name)) > 0),
  state text not null default 'planning' check (state in ('planning', 'running', 'finished', 'cancelled')),
  protocol_version_id uuid references protocol_versions (id),
  options jsonb not null default '{}',
  -- the visit that is fixed (null: the service) and its wall-clock time in zone
  anchor_visit text,
  anchor_local timestamp,
  zone text not null,
  findings jsonb not null default '[]',
  revision integer not null default 1,
  created_by uuid not null references users (id),
  started_by uuid references users (id),
  started_at timestamptz,
  cancelled_at timestamptz,
  created_at timestamptz not null default now(),
  updated_at timestamptz not null default now(),
  check (state in ('planning', 'cancelled') or (protocol_version_id is not null and started_at is not null)),
  check ((started_at is null) = (started_by is null))
);
create index cohorts_property on cohorts (property_id, state);
alter table audit_entries add foreign key (cohort_id) references cohorts (id);

create table groups (
  id uuid primary key,
  cohort_id uuid not null references cohorts (id) on delete cascade,
  position integer not null,
  name text not null check (length(trim(name)) > 0),
  class text not null check (class in ('heifer', 'firstCalver', 'cow', 'dairyHeifer', 'dairyCow')),
  -- head without ids; null when the group holds animals
  head_only integer check (head_only > 0),
  anchor_local timestamp,
  unique (cohort_id, name)
);

create table enrolments (
  id uuid primary key,
  group_id uuid not null references groups (id) on delete cascade,
  animal_id uuid not null references animals (id),
  left_at timestamptz,
  left_reason text,
  unique (group_id, animal_id)
);
create index enrolments_animal on enrolments (animal_id) where left_at is null;

create table tasks (
  id uuid primary key,
  cohort_id uuid not null references cohorts (id) on delete cascade,
  group_id uuid not null references groups (id) on delete cascade,
  property_id uuid not null references properties (id),
  visit_id text not null,
  occurrence integer not null default 1,
  title text not null,
  yarded boolean not null,
  due_at timestamptz not null,
  window_from timestamptz not null,
  window_to timestamptz not null,
  zone text not null,
  since_anchor_minutes integer,
  -- words for the step that the interval counts from
  anchor_label text,
  steps jsonb not null,
  state text not null default 'planned' check (state in ('planned', 'inWork', 'done', 'cancelled')),
  moved_from timestamptz,
  -- SEQUENCE of the calendar entry: rises with every change of time or state
  revision integer not null default 0,
  created_at timestamptz not null default now(),
  updated_at timestamptz not null default now(),
  unique (group_id, visit_id, occurrence),
  check (window_from <= window_to)
);
create index tasks_due on tasks (property_id, due_at);
create index tasks_cohort on tasks (cohort_id, due_at);

create table authorities (
  id uuid primary key,
  property_id uuid not null references properties (id),
  cohort_id uuid references cohorts (id),
  organisation_id uuid not null references organisations (id),
  active text not null,
  product_id uuid references products (id),
  amount double precision not null check (amount > 0),
  unit text not null,
  route text not null,
  classes text[] not null check (cardinality(classes) > 0),
  head integer not null check (head > 0),
  valid_from date not null,
  valid_to date not null,
  meat_days double precision check (meat_days >= 0),
  milk_hours double precision check (milk_hours >= 0),
  directions text not null default '',
  issued_by uuid not null references users (id),
  issued_at timestamptz not null default now(),
  withdrawn_at timestamptz,
  check (valid_to >= valid_from)
);
create index authorities_property on authorities (property_id);
create index authorities_cohort on authorities (cohort_id);

-- one act on one animal (or on a number of head) in one task; id is the client's
create table records (
  id uuid primary key,
  task_id uuid not null references tasks (id),
  property_id uuid not null references properties (id),
  animal_id uuid references animals (id),
  head integer not null default 1 check (head > 0),
  outcome text not null check (outcome in ('done', 'notDone', 'lost', 'withdrawn', 'undone')),
  reason text,
  observed jsonb not null default '{}',
  at timestamptz not null,
  received_at timestamptz not null default now(),
  user_id uuid not null references users (id),
  -- the vet under whose direction, from the authority in force
  direction_user_id uuid references users (id),
  corrects_id uuid references records (id),
  note text,
  check ((outcome = 'undone') = (corrects_id is not null)),
  check (animal_id is null or head = 1)
);
create index records_task on records (task_id);
create index records_animal on records (animal_id);
create unique index records_corrected_once on records (corrects_id) where corrects_id is not null;

-- what that act gave, step by step: the treatment register reads these
create table record_steps (
  record_id uuid not null references records (id),
  step_id text not null,
  kind text not null,
  outcome text not null check (outcome in ('done', 'notDone', 'lost', 'withdrawn')),
  reason text,
  active text,
  amount double precision,
  unit text,
  route text,
  product_batch_id uuid references product_batches (id),
  authority_id uuid references authorities (id),
  item integer not null default 0,
  primary key (record_id, step_id, item)
);

create function records_are_append_only() returns trigger language plpgsql as $$
begin
  raise exception 'records are corrected by a later record, never changed';
end $$;
create trigger records_keep before update or delete on records
  for each row execute function records_are_append_only();
create trigger record_steps_keep before update or delete on record_steps
  for each row execute function records_are_append_only();
`,
  down: `
drop table record_steps;
drop table records;
drop function records_are_append_only();
drop table authorities;
drop table tasks;
drop table enrolments;
drop table groups;
alter table audit_entries drop constraint audit_entries_cohort_id_fkey;
drop table cohorts;
`,
});
