-- Studios, the people in them, how they sign in, and the trail of what they did.
-- The application connects as holdfast_app, which owns nothing: each migration grants it exactly what it may do with
-- each new table. (Where that role has another name, the runner writes that name in its place.)

create table studios (
  id uuid primary key default gen_random_uuid(),
  name text not null check (char_length(name) between 1 and 120),
  time_zone text not null check (char_length(time_zone) between 1 and 60),
  temperature_unit text not null default 'C' check (temperature_unit in ('C', 'F')),
  mass_unit text not null default 'kg' check (mass_unit in ('kg', 'lb')),
  length_unit text not null default 'mm' check (length_unit in ('mm', 'in')),
  revision integer not null default 1 check (revision >= 1),
  created_at timestamptz(3) not null default now()
);

create table users (
  id uuid primary key default gen_random_uuid(),
  name text not null check (char_length(name) between 1 and 120),
  email text not null unique check (email = lower(email) and char_length(email) between 3 and 254),
  -- The person's own units; all null where the studio's are used.
  temperature_unit text check (temperature_unit in ('C', 'F')),
  mass_unit text check (mass_unit in ('kg', 'lb')),
  length_unit text check (length_unit in ('mm', 'in')),
  theme text not null default 'auto' check (theme in ('auto', 'light', 'dark')),
  created_at timestamptz(3) not null default now(),
  check (num_nulls(temperature_unit, mass_unit, length_unit) in (0, 3))
);

-- Apart from `users`, so that no query that lists people can carry a hash along.
create table credentials (
  user_id uuid primary key references users (id),
  password_hash text not null check (password_hash like '$2%'),
  changed_at timestamptz(3) not null default now()
);

-- A membership that ended stays, since what the person did refers to it.
create table memberships (
  studio_id uuid not null references studios (id),
  user_id uuid not null references users (id),
  roles text[] not null
    check (cardinality(roles) between 1 and 4 and roles <@ array['owner', 'technician', 'teacher', 'student']),
  created_at timestamptz(3) not null default now(),
  ended_at timestamptz(3),
  primary key (studio_id, user_id)
);
create index memberships_by_user on memberships (user_id);

create table sessions (
  id uuid primary key default gen_random_uuid(),
  user_id uuid not null,
  -- The studio the person works in through this session.
  studio_id uuid not null,
  device text not null default '' check (char_length(device) <= 120),
  created_at timestamptz(3) not null default now(),
  last_seen_at timestamptz(3) not null default now(),
  -- Moves on with use, but never past `created_at` plus the longest life of a session.
  expires_at timestamptz(3) not null,
  foreign key (studio_id, user_id) references memberships (studio_id, user_id)
);
create index sessions_by_user on sessions (user_id, last_seen_at desc);
create index sessions_by_expiry on sessions (expires_at);

-- Failed sign-ins by account, address and browser. The key is a hash: no address of a person or machine is kept.
create table throttles (
  key text primary key check (char_length(key) = 64),
  failures integer not null check (failures >= 0),
  last_failure_at timestamptz(3) not null,
  opens_at timestamptz(3) not null
);
create index throttles_by_age on throttles (last_failure_at);

-- The one-time link with which the first owner of an installation is made. Only its hash is kept.
create table setup_tokens (
  token_hash text primary key check (char_length(token_hash) = 64),
  created_at timestamptz(3) not null default now(),
  expires_at timestamptz(3) not null,
  used_at timestamptz(3)
);

-- Who did what to which thing. Ids, not names, so that a person can be forgotten. Added to, never changed.
create table audit_events (
  studio_id uuid not null references studios (id),
  id uuid not null default gen_random_uuid(),
  at timestamptz(3) not null default clock_timestamp(),
  actor_id uuid,
  what text not null check (char_length(what) between 1 and 60),
  subject_kind text not null check (char_length(subject_kind) between 1 and 40),
  subject_id uuid,
  detail jsonb not null default '{}',
  primary key (studio_id, id)
);
create index audit_events_by_time on audit_events (studio_id, at desc);
create index audit_events_by_subject on audit_events (studio_id, subject_kind, subject_id, at desc);

grant select, insert, update on studios, users, credentials, memberships to holdfast_app;
grant select, insert, update, delete on sessions, throttles to holdfast_app;
grant select, update on setup_tokens to holdfast_app;
grant select, insert on audit_events to holdfast_app;
