import { sqlMigration } from './sql';

/** Protocols with their versions, animals, products and product batches. */
export const { up, down } = sqlMigration({
  up: `
create table protocols (
  id uuid primary key,
  organisation_id uuid not null references organisations (id),
  name text not null check (length(trim(name)) > 0),
  library_id text,
  created_by uuid not null references users (id),
  created_at timestamptz not null default now()
);
create index protocols_organisation on protocols (organisation_id);

create table protocol_versions (
  id uuid primary key,
  protocol_id uuid not null references protocols (id),
  number integer not null check (number > 0),
  state text not null check (state in ('workingCopy', 'signedOff', 'retired')),
  body jsonb not null,
  revision integer not null default 1,
  signed_by uuid references users (id),
  signed_at timestamptz,
  created_at timestamptz not null default now(),
  updated_at timestamptz not null default now(),
  unique (protocol_id, number),
  check ((state = 'workingCopy') = (signed_at is null)),
  check ((signed_at is null) = (signed_by is null))
);
create unique index protocol_versions_one_working_copy on protocol_versions (protocol_id) where state = 'workingCopy';

-- a signed-off version never changes: only its retirement may be written
create function signed_off_is_immutable() returns trigger language plpgsql as $$
begin
  if old.state <> 'workingCopy' then
    if tg_op = 'DELETE' then
      raise exception 'a signed-off protocol version is never deleted';
    end if;
    if new.body is distinct from old.body or new.number <> old.number or new.protocol_id <> old.protocol_id
       or new.signed_by is distinct from old.signed_by or new.signed_at is distinct from old.signed_at
       or new.state = 'workingCopy' then
      raise exception 'a signed-off protocol version never changes';
    end if;
  end if;
  return case when tg_op = 'DELETE' then old else new end;
end $$;
create trigger protocol_versions_keep before update or delete on protocol_versions
  for each row execute function signed_off_is_immutable();

create table animals (
  id uuid primary key,
  property_id uuid not null references properties (id),
  tag text not null check (length(trim(tag)) > 0),
  eid char(15) check (eid ~ '^[0-9]{15}$'),
  class text not null check (class in ('heifer', 'firstCalver', 'cow', 'dairyHeifer', 'dairyCow')),
  breed text,
  birth date,
  sire text,
  dam text,
  last_calving date,
  last_service date,
  known_empty boolean,
  weight_kg double precision check (weight_kg > 0),
  condition double precision check (condition between 1 and 9),
  paddock text,
  note text,
  state text not null default 'present' check (state in ('present', 'left')),
  created_at timestamptz not null default now(),
  updated_at timestamptz not null default now(),
  unique (property_id, tag)
);
create unique index animals_eid on animals (property_id, eid) where eid is not null;

create table animal_imports (
  id uuid primary key,
  property_id uuid not null references properties (id),
  user_id uuid not null references users (id),
  file_name text not null,
  file_hash text not null,
  counts jsonb not null,
  animal_ids uuid[] not null,
  created_at timestamptz not null default now()
);

create table products (
  id uuid primary key,
  organisation_id uuid not null references organisations (id),
  name text not null check (length(trim(name)) > 0),
  active text not null,
  strength double precision not null check (strength > 0),
  unit text not null,
  per text not null check (per in ('mL', 'piece', 'g')),
  pack_size double precision check (pack_size > 0),
  route text not null,
  meat_days double precision check (meat_days >= 0),
  milk_hours double precision check (milk_hours >= 0),
  open_days integer check (open_days > 0),
  created_at timestamptz not null default now(),
  unique (organisation_id, name)
);

create table product_batches (
  id uuid primary key,
  property_id uuid not null references properties (id),
  product_id uuid not null references products (id),
  number text not null,
  expiry date not null,
  quantity double precision not null check (quantity > 0),
  broached_at timestamptz,
  created_at timestamptz not null default now(),
  unique (property_id, product_id, number)
);
`,
  down: `
drop table product_batches;
drop table products;
drop table animal_imports;
drop table animals;
drop table protocol_versions;
drop function signed_off_is_immutable();
drop table protocols;
`,
});
