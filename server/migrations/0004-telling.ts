import { sqlMigration } from './sql';

/** The message outbox, delivery attempts and calendar links. */
export const { up, down } = sqlMigration({
  up: `
create table messages (
  id uuid primary key,
  -- one message per person, subject, moment and channel, whatever restarts
  dedupe_key text not null unique,
  channel text not null check (channel in ('email')),
  kind text not null check (kind in ('evening', 'morning', 'closing', 'invitation', 'passwordReset', 'planChanged')),
  user_id uuid references users (id) on delete cascade,
  address text not null,
  task_id uuid references tasks (id) on delete cascade,
  property_id uuid references properties (id),
  -- what the words are made of; secrets in links are here until sent, then blanked
  params jsonb not null default '{}',
  due_at timestamptz not null,
  -- after this moment it is no longer worth sending
  stale_at timestamptz,
  state text not null default 'waiting' check (state in ('waiting', 'sent', 'withdrawn', 'failed')),
  attempts integer not null default 0,
  next_try_at timestamptz not null,
  claimed_until timestamptz,
  claimed_by text,
  sent_at timestamptz,
  created_at timestamptz not null default now(),
  updated_at timestamptz not null default now()
);
create index messages_next on messages (next_try_at) where state = 'waiting';
create index messages_task on messages (task_id) where state = 'waiting';

create table delivery_attempts (
  id uuid primary key,
  message_id uuid not null references messages (id) on delete cascade,
  at timestamptz not null default now(),
  ok boolean not null,
  answer text not null default ''
);
create index delivery_attempts_message on delivery_attempts (message_id);

create table calendar_links (
  id uuid primary key,
  user_id uuid not null references users (id) on delete cascade,
  label text not null check (length(trim(label)) > 0),
  -- null: everything that the person may see
  property_id uuid references properties (id),
  secret_hash text not null unique,
  created_at timestamptz not null default now(),
  revoked_at timestamptz,
  last_read_at timestamptz
);
create index calendar_links_user on calendar_links (user_id) where revoked_at is null;

create table worker_beats (
  name text primary key,
  at timestamptz not null
);
`,
  down: `
drop table worker_beats;
drop table calendar_links;
drop table delivery_attempts;
drop table messages;
`,
});
