-- Runs, their logs as kept and as read, and what was found in them.

create table run_counters (
  studio_id uuid primary key references studios (id),
  last_number integer not null check (last_number >= 0)
);

create table runs (
  studio_id uuid not null references studios (id),
  id uuid not null,
  number integer not null check (number >= 1),
  state text not null check (state in ('planned', 'under-way', 'cooling-down', 'closed', 'broken-off')),
  revision integer not null default 1 check (revision >= 1),
  kiln_id uuid not null,
  profile_version_id uuid not null,
  handout_id uuid,
  load jsonb,
  -- { profile, kiln, load } as they were when the run began; null while it is only planned.
  frozen jsonb,
  planned_start_at timestamptz(3) not null,
  started_at timestamptz(3),
  finished_at timestamptz(3),
  closed_at timestamptz(3),
  broken_off_reason text not null default '' check (length(broken_off_reason) <= 2000),
  note text not null default '' check (length(note) <= 4000),
  current_log_id uuid,
  signed_off_by uuid references users (id),
  sign_off_remark text not null default '' check (length(sign_off_remark) <= 4000),
  created_by uuid not null references users (id),
  created_at timestamptz(3) not null default now(),
  primary key (studio_id, id),
  unique (studio_id, number),
  foreign key (studio_id, kiln_id) references kilns (studio_id, id),
  foreign key (studio_id, profile_version_id) references profile_versions (studio_id, id),
  foreign key (studio_id, handout_id) references handouts (studio_id, id),
  check (state = 'planned' or state = 'broken-off' or (frozen is not null and started_at is not null)),
  check ((state = 'closed') = (closed_at is not null)),
  check (state <> 'broken-off' or broken_off_reason <> '')
);
create index runs_by_number on runs (studio_id, number desc);
create index runs_by_kiln on runs (studio_id, kiln_id, planned_start_at);
create index runs_by_version on runs (studio_id, profile_version_id);

create table run_recorders (
  studio_id uuid not null,
  run_id uuid not null,
  user_id uuid not null references users (id),
  primary key (studio_id, run_id, user_id),
  foreign key (studio_id, run_id) references runs (studio_id, id) on delete cascade
);
create index run_recorders_by_user on run_recorders (studio_id, user_id);

-- A file as it came, byte for byte, in parts small enough to stream.
create table uploads (
  studio_id uuid not null references studios (id),
  id uuid not null,
  run_id uuid not null,
  file_name text not null check (length(file_name) <= 255),
  bytes bigint not null check (bytes >= 0),
  sha256 text not null check (sha256 ~ '^[0-9a-f]{64}$'),
  uploaded_by uuid not null references users (id),
  created_at timestamptz(3) not null default now(),
  primary key (studio_id, id),
  unique (studio_id, run_id, sha256),
  foreign key (studio_id, run_id) references runs (studio_id, id)
);

create table upload_parts (
  studio_id uuid not null,
  upload_id uuid not null,
  part integer not null check (part >= 0),
  data bytea not null,
  primary key (studio_id, upload_id, part),
  foreign key (studio_id, upload_id) references uploads (studio_id, id) on delete cascade deferrable initially deferred
);
alter table upload_parts alter column data set storage external;

-- One reading of a kept file. Another mapping is another reading; no reading replaces another.
create table logs (
  studio_id uuid not null,
  id uuid not null,
  run_id uuid not null,
  upload_id uuid not null,
  revision integer not null default 1 check (revision >= 1),
  -- The mapping as canonical JSON: with the upload it makes the reading idempotent.
  mapping_key text not null check (length(mapping_key) <= 4000),
  report jsonb not null,
  -- How the log lies on the plan: { method, confidence, startOffsetS, startMs }; and what the reader and the review know of its clock.
  alignment jsonb not null,
  review jsonb not null,
  created_by uuid not null references users (id),
  created_at timestamptz(3) not null default now(),
  primary key (studio_id, id),
  unique (studio_id, upload_id, mapping_key),
  foreign key (studio_id, run_id) references runs (studio_id, id),
  foreign key (studio_id, upload_id) references uploads (studio_id, id)
);
create index logs_by_run on logs (studio_id, run_id, created_at);
alter table runs add foreign key (studio_id, current_log_id) references logs (studio_id, id);

create table log_channels (
  studio_id uuid not null,
  id uuid not null,
  log_id uuid not null,
  position integer not null check (position >= 0),
  name text not null check (length(name) <= 200),
  quantity text not null check (quantity in ('temperature', 'emf', 'power', 'other')),
  role text not null check (role in ('chamber', 'mould', 'load', 'junction', 'room', 'other')),
  unit text not null check (length(unit) <= 20),
  primary key (studio_id, id),
  unique (studio_id, log_id, position),
  foreign key (studio_id, log_id) references logs (studio_id, id) on delete cascade deferrable initially deferred
);

-- Samples as compressed columns: level 0 as measured, higher levels as buckets that keep least, greatest and mean.
create table sample_chunks (
  studio_id uuid not null,
  log_id uuid not null,
  level smallint not null check (level between 0 and 8),
  chunk integer not null check (chunk >= 0),
  from_ms double precision not null,
  to_ms double precision not null,
  rows integer not null check (rows >= 1),
  data bytea not null,
  primary key (studio_id, log_id, level, chunk),
  foreign key (studio_id, log_id) references logs (studio_id, id) on delete cascade deferrable initially deferred,
  check (to_ms >= from_ms)
);
alter table sample_chunks alter column data set storage external;

create table findings (
  studio_id uuid not null,
  id uuid not null,
  run_id uuid not null,
  -- The reading it was computed from; null for one that a person added.
  log_id uuid,
  revision integer not null default 1 check (revision >= 1),
  kind text not null check (length(kind) <= 40),
  severity text not null check (severity in ('note', 'warn', 'serious')),
  origin text not null check (origin in ('computed', 'person')),
  state text not null default 'open' check (state in ('open', 'confirmed', 'dismissed')),
  channel_id uuid,
  segment smallint check (segment >= 0),
  start_s double precision not null,
  end_s double precision not null,
  peak_c double precision,
  by_c double precision,
  by_s double precision,
  by_c_per_h double precision,
  hold_lost_s double precision,
  expected boolean not null default false,
  text text not null default '' check (length(text) <= 1000),
  remark text not null default '' check (length(remark) <= 4000),
  follow_up jsonb,
  decided_by uuid references users (id),
  decided_at timestamptz(3),
  created_at timestamptz(3) not null default now(),
  primary key (studio_id, id),
  foreign key (studio_id, run_id) references runs (studio_id, id),
  foreign key (studio_id, log_id) references logs (studio_id, id),
  foreign key (studio_id, channel_id) references log_channels (studio_id, id),
  check (end_s >= start_s),
  check ((origin = 'person') = (log_id is null)),
  check ((decided_by is null) = (decided_at is null))
);
create index findings_by_run on findings (studio_id, run_id, start_s);

grant select, insert, update on run_counters, runs to holdfast_app;
grant select, insert, delete on run_recorders to holdfast_app;
grant select, insert on uploads, upload_parts, log_channels to holdfast_app;
-- A reading that ends in a question is taken back within its own transaction.
grant select, insert, delete on sample_chunks to holdfast_app;
grant select, insert, update on logs to holdfast_app;
grant select, insert, update, delete on findings to holdfast_app;
