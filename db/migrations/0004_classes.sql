-- Classes, and approved versions handed out to them.

create table classes (
  studio_id uuid not null references studios (id),
  id uuid not null,
  name text not null check (length(name) between 1 and 120),
  name_key text generated always as (lower(name)) stored,
  term text not null default '' check (length(term) <= 60),
  teacher_id uuid not null references users (id),
  revision integer not null default 1 check (revision >= 1),
  created_at timestamptz(3) not null default now(),
  archived_at timestamptz(3),
  primary key (studio_id, id)
);
create index classes_by_name on classes (studio_id, name_key, id);

create table class_members (
  studio_id uuid not null,
  class_id uuid not null,
  user_id uuid not null,
  primary key (studio_id, class_id, user_id),
  foreign key (studio_id, class_id) references classes (studio_id, id),
  foreign key (studio_id, user_id) references memberships (studio_id, user_id) on delete cascade
);
create index class_members_by_user on class_members (studio_id, user_id);

create table handouts (
  studio_id uuid not null references studios (id),
  id uuid not null,
  profile_version_id uuid not null,
  kiln_id uuid not null,
  class_id uuid,
  from_at timestamptz(3) not null,
  until_at timestamptz(3) not null,
  note text not null default '' check (length(note) <= 4000),
  -- The cautions as they were computed for this version and this kiln when it was handed out: what is acknowledged.
  cautions jsonb not null check (jsonb_typeof(cautions) = 'array'),
  handed_out_by_id uuid not null references users (id),
  created_at timestamptz(3) not null default now(),
  withdrawn_at timestamptz(3),
  withdrawn_reason text not null default '' check (length(withdrawn_reason) <= 2000),
  withdrawn_by_id uuid references users (id),
  primary key (studio_id, id),
  foreign key (studio_id, profile_version_id) references profile_versions (studio_id, id),
  foreign key (studio_id, kiln_id) references kilns (studio_id, id),
  foreign key (studio_id, class_id) references classes (studio_id, id),
  check (until_at > from_at),
  check ((withdrawn_at is null) = (withdrawn_by_id is null)),
  check ((withdrawn_at is null) = (withdrawn_reason = ''))
);
create index handouts_by_creation on handouts (studio_id, created_at desc, id desc);
create index handouts_by_version on handouts (studio_id, profile_version_id);
create index handouts_by_kiln on handouts (studio_id, kiln_id);
create index handouts_by_class on handouts (studio_id, class_id);

-- People named one by one, beside the class.
create table handout_people (
  studio_id uuid not null,
  handout_id uuid not null,
  user_id uuid not null,
  primary key (studio_id, handout_id, user_id),
  foreign key (studio_id, handout_id) references handouts (studio_id, id),
  foreign key (studio_id, user_id) references memberships (studio_id, user_id) on delete cascade
);
create index handout_people_by_user on handout_people (studio_id, user_id);

create table handout_acknowledgements (
  studio_id uuid not null,
  handout_id uuid not null,
  user_id uuid not null references users (id),
  at timestamptz(3) not null default now(),
  cautions integer not null check (cautions >= 0),
  primary key (studio_id, handout_id, user_id),
  foreign key (studio_id, handout_id) references handouts (studio_id, id)
);

-- What was handed out stays as it was; it can only be withdrawn, once.
create function keep_handout() returns trigger language plpgsql as $$
begin
  if tg_op = 'DELETE' then
    raise exception 'a handout is never deleted, only withdrawn' using errcode = 'integrity_constraint_violation';
  end if;
  if old.withdrawn_at is not null or new.withdrawn_at is null
    or (to_jsonb(new) - '{withdrawn_at,withdrawn_reason,withdrawn_by_id}'::text[])
      is distinct from (to_jsonb(old) - '{withdrawn_at,withdrawn_reason,withdrawn_by_id}'::text[]) then
    raise exception 'a handout never changes, it can only be withdrawn, once' using errcode = 'integrity_constraint_violation';
  end if;
  return new;
end $$;
create trigger keep_handout before update or delete on handouts for each row execute function keep_handout();

-- Only an approved version is handed out. The state is locked, so that it cannot be retired in the same moment.
create function hand_out_approved() returns trigger language plpgsql as $$
declare
  present text;
begin
  select state into present from version_states
    where studio_id = new.studio_id and version_id = new.profile_version_id for share;
  if present is distinct from 'approved' then
    raise exception 'version % is %, only an approved one is handed out', new.profile_version_id, present
      using errcode = 'integrity_constraint_violation';
  end if;
  return new;
end $$;
create trigger hand_out_approved before insert on handouts for each row execute function hand_out_approved();

grant select, insert on classes, class_members, handouts, handout_people, handout_acknowledgements to holdfast_app;
grant update (name, term, revision, archived_at) on classes to holdfast_app;
grant delete on class_members to holdfast_app;
grant update (withdrawn_at, withdrawn_reason, withdrawn_by_id) on handouts to holdfast_app;
