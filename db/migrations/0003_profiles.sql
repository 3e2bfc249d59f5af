-- Profiles, their numbered versions, the state each version is in, and what happened to it.

-- How a studio works: whether an author may approve their own version (a studio of one), and when people are there,
-- in local minutes of the day, for the moments of a firing that need somebody.
alter table studios
  add column authors_approve boolean not null default false,
  add column attended_from_minute integer not null default 480 check (attended_from_minute between 0 and 1439),
  add column attended_until_minute integer not null default 1200 check (attended_until_minute between 1 and 1440),
  add check (attended_until_minute > attended_from_minute);

create table profiles (
  studio_id uuid not null references studios (id),
  id uuid not null,
  name text not null check (length(name) between 1 and 120),
  author_id uuid not null references users (id),
  revision integer not null default 1 check (revision >= 1),
  created_at timestamptz(3) not null default now(),
  -- Also moved on by any change of one of its versions: the list begins with what was last worked on.
  updated_at timestamptz(3) not null default now(),
  archived_at timestamptz(3),
  primary key (studio_id, id)
);
create index profiles_by_update on profiles (studio_id, updated_at desc, id desc);
create index profiles_by_author on profiles (studio_id, author_id);

create table profile_versions (
  studio_id uuid not null references studios (id),
  id uuid not null,
  profile_id uuid not null,
  number integer not null check (number >= 1),
  author_id uuid not null references users (id),
  -- Who last changed the content: may not approve it either.
  edited_by_id uuid not null references users (id),
  profile jsonb not null check (jsonb_typeof(profile) = 'object'),
  kiln_id uuid,
  load jsonb check (jsonb_typeof(load) = 'object'),
  sha256 text not null check (sha256 ~ '^[0-9a-f]{64}$'),
  created_at timestamptz(3) not null default now(),
  primary key (studio_id, id),
  unique (studio_id, profile_id, number),
  foreign key (studio_id, profile_id) references profiles (studio_id, id),
  foreign key (studio_id, kiln_id) references kilns (studio_id, id)
);
create index profile_versions_by_author on profile_versions (studio_id, author_id);
create index profile_versions_by_kiln on profile_versions (studio_id, kiln_id);

create table version_states (
  studio_id uuid not null,
  version_id uuid not null,
  state text not null check (state in ('draft', 'in-review', 'approved', 'retired')),
  revision integer not null default 1 check (revision >= 1),
  primary key (studio_id, version_id),
  foreign key (studio_id, version_id) references profile_versions (studio_id, id)
);
create index version_states_by_state on version_states (studio_id, state);

create table version_events (
  studio_id uuid not null,
  id uuid not null,
  version_id uuid not null,
  what text not null check (what in ('submitted', 'approved', 'returned', 'retired')),
  at timestamptz(3) not null default now(),
  by_id uuid not null references users (id),
  note text not null default '' check (length(note) <= 4000),
  -- [{ code, segment, reason }]: cautions that the approver overrode
  overrides jsonb not null default '[]' check (jsonb_typeof(overrides) = 'array'),
  -- [{ segment, remark }]
  segment_remarks jsonb not null default '[]' check (jsonb_typeof(segment_remarks) = 'array'),
  primary key (studio_id, id),
  foreign key (studio_id, version_id) references profile_versions (studio_id, id)
);
create index version_events_by_version on version_events (studio_id, version_id, at, id);
-- A version is approved at most once, whatever two approvers do at the same moment.
create unique index version_approved_once on version_events (studio_id, version_id) where what = 'approved';

-- Content changes only while its version is a draft. The state row is locked, so that a change and a submission
-- at the same moment come one after the other.
create function keep_version_content() returns trigger language plpgsql as $$
declare
  present text;
begin
  if tg_op = 'DELETE' then
    raise exception 'a version is never deleted' using errcode = 'integrity_constraint_violation';
  end if;
  if (new.studio_id, new.id, new.profile_id, new.number, new.author_id, new.created_at)
    is distinct from (old.studio_id, old.id, old.profile_id, old.number, old.author_id, old.created_at) then
    raise exception 'whose version it is, and its number, never change' using errcode = 'integrity_constraint_violation';
  end if;
  select state into present from version_states
    where studio_id = old.studio_id and version_id = old.id for update;
  if present is distinct from 'draft' then
    raise exception 'version % is %, its content never changes', old.id, present using errcode = 'integrity_constraint_violation';
  end if;
  return new;
end $$;
create trigger keep_version_content before update or delete on profile_versions
  for each row execute function keep_version_content();

create function keep_version_state() returns trigger language plpgsql as $$
begin
  if tg_op = 'DELETE' then
    raise exception 'a version always has a state' using errcode = 'integrity_constraint_violation';
  end if;
  if tg_op = 'INSERT' then
    if new.state <> 'draft' then
      raise exception 'a version begins as a draft' using errcode = 'integrity_constraint_violation';
    end if;
    return new;
  end if;
  if (new.studio_id, new.version_id) is distinct from (old.studio_id, old.version_id)
    or new.revision <> old.revision + 1
    or (old.state, new.state) not in (
      ('draft', 'draft'), ('draft', 'in-review'), ('in-review', 'draft'), ('in-review', 'approved'), ('approved', 'retired')
    ) then
    raise exception 'a version does not go from % to %', old.state, new.state using errcode = 'integrity_constraint_violation';
  end if;
  return new;
end $$;
create trigger keep_version_state before insert or update or delete on version_states
  for each row execute function keep_version_state();

grant select, insert on profiles, profile_versions, version_states, version_events to holdfast_app;
grant update (name, revision, updated_at, archived_at) on profiles to holdfast_app;
grant update (profile, kiln_id, load, sha256, edited_by_id) on profile_versions to holdfast_app;
grant update (state, revision) on version_states to holdfast_app;
