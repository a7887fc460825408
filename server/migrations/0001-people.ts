import { sqlMigration } from './sql';

/** People: who there is, what they belong to, how they come in. */
export const { up, down } = sqlMigration({
  up: `
create table organisations (
  id uuid primary key,
  name text not null check (length(trim(name)) > 0),
  kind text not null check (kind in ('vetPractice', 'aiContractor')),
  created_at timestamptz not null default now()
);

create table properties (
  id uuid primary key,
  name text not null check (length(trim(name)) > 0),
  zone text not null,
  country char(2) not null,
  region text,
  locale text not null default 'en-AU',
  latitude double precision check (latitude between -90 and 90),
  longitude double precision check (longitude between -180 and 180),
  yard_from time,
  yard_to time,
  milkings text[] not null default '{}',
  weekend_days smallint[] not null default '{6,7}',
  created_at timestamptz not null default now(),
  updated_at timestamptz not null default now(),
  check ((yard_from is null) = (yard_to is null))
);

create table engagements (
  id uuid primary key,
  organisation_id uuid not null references organisations (id),
  property_id uuid not null references properties (id),
  scope text not null check (scope in ('veterinary', 'insemination')),
  from_date date not null,
  to_date date,
  created_at timestamptz not null default now(),
  unique (organisation_id, property_id, scope, from_date),
  check (to_date is null or to_date >= from_date)
);
create index engagements_property on engagements (property_id);

create table users (
  id uuid primary key,
  email text not null unique check (email = lower(email)),
  name text not null check (length(trim(name)) > 0),
  password_hash text not null,
  remind_evening boolean not null default true,
  remind_morning boolean not null default true,
  remind_closing boolean not null default true,
  evening_at time not null default '18:00',
  morning_at time not null default '05:30',
  created_at timestamptz not null default now(),
  updated_at timestamptz not null default now()
);

-- id is the SHA-256 of the secret in the cookie: a stolen table opens no session
create table sessions (
  id text primary key,
  user_id uuid not null references users (id) on delete cascade,
  expires_at timestamptz not null
);
create index sessions_user on sessions (user_id);

create table memberships (
  id uuid primary key,
  user_id uuid not null references users (id) on delete cascade,
  organisation_id uuid references organisations (id),
  property_id uuid references properties (id),
  role text not null check (role in ('vet', 'manager', 'technician', 'staff', 'calendarOnly')),
  created_at timestamptz not null default now(),
  ended_at timestamptz,
  check ((organisation_id is null) <> (property_id is null)),
  check ((role in ('vet', 'technician')) = (organisation_id is not null))
);
create unique index memberships_once on memberships (user_id, coalesce(organisation_id, property_id), role) where ended_at is null;
create index memberships_property on memberships (property_id) where ended_at is null;

create table invitations (
  id uuid primary key,
  email text not null check (email = lower(email)),
  role text not null check (role in ('manager', 'staff', 'calendarOnly', 'vet', 'technician')),
  property_id uuid references properties (id),
  organisation_id uuid references organisations (id),
  token_hash text not null unique,
  invited_by uuid not null references users (id),
  expires_at timestamptz not null,
  accepted_at timestamptz,
  withdrawn_at timestamptz,
  created_at timestamptz not null default now(),
  check ((organisation_id is null) <> (property_id is null))
);

create table password_resets (
  id uuid primary key,
  user_id uuid not null references users (id) on delete cascade,
  token_hash text not null unique,
  expires_at timestamptz not null,
  used_at timestamptz,
  created_at timestamptz not null default now()
);

create table audit_entries (
  id uuid primary key,
  at timestamptz not null default now(),
  user_id uuid references users (id),
  property_id uuid references properties (id),
  organisation_id uuid references organisations (id),
  cohort_id uuid,
  action text not null,
  summary text not null,
  detail jsonb not null default '{}'
);
create index audit_entries_cohort on audit_entries (cohort_id, at desc, id desc);
create index audit_entries_property on audit_entries (property_id, at desc, id desc);

-- what was written here stays as it is
create function audit_is_append_only() returns trigger language plpgsql as $$
begin
  raise exception 'audit entries are never changed';
end $$;
create trigger audit_entries_keep before update or delete on audit_entries
  for each row execute function audit_is_append_only();
`,
  down: `
drop table audit_entries;
drop function audit_is_append_only();
drop table password_resets;
drop table invitations;
drop table memberships;
drop table sessions;
drop table users;
drop table engagements;
drop table properties;
drop table organisations;
`,
});
