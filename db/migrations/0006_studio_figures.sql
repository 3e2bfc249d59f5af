-- A studio's own figures in place of those of the materials table, by material.

create table studio_figures (
  studio_id uuid not null references studios (id),
  kind text not null check (kind in ('moulds', 'patterns', 'furniture')),
  material text not null check (length(material) between 1 and 60),
  -- Property to value, in the table's unit.
  figures jsonb not null check (jsonb_typeof(figures) = 'object'),
  note text not null default '' check (length(note) <= 2000),
  revision integer not null default 1 check (revision >= 1),
  set_by uuid not null references users (id),
  updated_at timestamptz(3) not null default now(),
  primary key (studio_id, kind, material)
);

grant select, insert, update on studio_figures to holdfast_app;
