-- Kilns, furnaces, thermocouples and tariffs. Nothing here is deleted: what is no longer used is archived.

create table tariffs (
  studio_id uuid not null references studios (id),
  id uuid not null,
  name text not null check (length(name) between 1 and 120),
  name_key text generated always as (lower(name)) stored,
  currency text not null check (currency ~ '^[A-Z]{3}$'),
  energy text not null check (energy in ('electricity', 'propane', 'natural-gas')),
  per text not null check (per in ('kWh', 'kg', 'm3')),
  -- Decimal, with the digits that were typed.
  price numeric not null check (price >= 0 and price < 1e9 and scale(price) <= 6),
  -- [{ days, fromMinute, toMinute, pricePerKWh }]
  bands jsonb not null default '[]' check (jsonb_typeof(bands) = 'array'),
  co2_kg_per_kwh double precision check (co2_kg_per_kwh between 0 and 5),
  co2_source text not null default '' check (length(co2_source) <= 200),
  note text not null default '' check (length(note) <= 2000),
  revision integer not null default 1 check (revision >= 1),
  created_at timestamptz(3) not null default now(),
  updated_at timestamptz(3) not null default now(),
  archived_at timestamptz(3),
  primary key (studio_id, id),
  check (case when jsonb_typeof(bands) = 'array' then jsonb_array_length(bands) <= 24 else false end)
);
create index tariffs_by_name on tariffs (studio_id, name_key, id);

create table thermocouples (
  studio_id uuid not null references studios (id),
  id uuid not null,
  name text not null check (length(name) between 1 and 120),
  name_key text generated always as (lower(name)) stored,
  type text not null check (type in ('B', 'E', 'J', 'K', 'N', 'R', 'S', 'T')),
  tolerance_class text not null check (tolerance_class in ('1', '2', '3', 'special', 'standard')),
  sheath_m double precision check (sheath_m between 0.0005 and 0.05),
  max_c double precision check (max_c between 100 and 1800),
  -- [{ atC, offsetC }]
  calibration jsonb not null default '[]',
  note text not null default '' check (length(note) <= 2000),
  revision integer not null default 1 check (revision >= 1),
  created_at timestamptz(3) not null default now(),
  updated_at timestamptz(3) not null default now(),
  archived_at timestamptz(3),
  primary key (studio_id, id),
  check (case when jsonb_typeof(calibration) = 'array' then jsonb_array_length(calibration) <= 50 else false end)
);
create index thermocouples_by_name on thermocouples (studio_id, name_key, id);

create table kilns (
  studio_id uuid not null references studios (id),
  id uuid not null,
  name text not null check (length(name) between 1 and 120),
  name_key text generated always as (lower(name)) stored,
  energy text not null check (energy in ('electric', 'gas')),
  inner_width_m double precision not null check (inner_width_m between 0.02 and 20),
  inner_depth_m double precision not null check (inner_depth_m between 0.02 and 20),
  inner_height_m double precision not null check (inner_height_m between 0.02 and 20),
  lining text not null check (lining in ('brick', 'fibre', 'brick-and-fibre')),
  lining_m double precision not null check (lining_m between 0.01 and 1),
  -- [{ material, thicknessM }], hot face first
  lining_layers jsonb not null default '[]',
  max_c double precision not null check (max_c between 100 and 1400),
  vent_m3_per_h double precision check (vent_m3_per_h between 0 and 500),
  wait_band_c double precision check (wait_band_c between 1 and 200),
  programmer_segments integer check (programmer_segments between 1 and 200),
  programmer_max_rate_c_per_h double precision check (programmer_max_rate_c_per_h between 1 and 5000),
  open_at_c double precision not null check (open_at_c between 30 and 400),
  loss_factor double precision not null check (loss_factor between 0.2 and 5),
  heat_capacity_factor double precision not null check (heat_capacity_factor between 0.2 and 5),
  thermocouple_lag_s double precision not null check (thermocouple_lag_s between 0 and 1800),
  thermocouple_offset_c double precision not null check (thermocouple_offset_c between -100 and 100),
  -- Electric
  rated_kw double precision check (rated_kw between 0.1 and 1000),
  volts_v double precision check (volts_v between 10 and 1000),
  supply_v double precision check (supply_v between 10 and 1000),
  rated_power_share double precision check (rated_power_share between 0.1 and 1.2),
  -- Gas
  burner_kw double precision check (burner_kw between 0.1 and 3000),
  fuel text check (fuel in ('propane', 'natural-gas')),
  excess_air_share double precision check (excess_air_share between 0 and 3),
  note text not null default '' check (length(note) <= 2000),
  thermocouple_id uuid,
  tariff_id uuid,
  revision integer not null default 1 check (revision >= 1),
  created_at timestamptz(3) not null default now(),
  updated_at timestamptz(3) not null default now(),
  archived_at timestamptz(3),
  primary key (studio_id, id),
  foreign key (studio_id, thermocouple_id) references thermocouples (studio_id, id),
  foreign key (studio_id, tariff_id) references tariffs (studio_id, id),
  check (case when jsonb_typeof(lining_layers) = 'array' then jsonb_array_length(lining_layers) <= 6 else false end),
  check (
    case energy
      when 'electric' then rated_kw is not null and rated_power_share is not null
        and burner_kw is null and fuel is null and excess_air_share is null
      else burner_kw is not null and fuel is not null and excess_air_share is not null
        and rated_kw is null and volts_v is null and supply_v is null and rated_power_share is null
    end
  )
);
create index kilns_by_name on kilns (studio_id, name_key, id);
create index kilns_by_thermocouple on kilns (studio_id, thermocouple_id);
create index kilns_by_tariff on kilns (studio_id, tariff_id);

create table furnaces (
  studio_id uuid not null references studios (id),
  id uuid not null,
  name text not null check (length(name) between 1 and 120),
  name_key text generated always as (lower(name)) stored,
  energy text not null check (energy in ('electric', 'gas')),
  efficiency_share double precision check (efficiency_share between 0.01 and 1),
  capacity_kg double precision not null check (capacity_kg > 0 and capacity_kg <= 5000),
  max_c double precision not null check (max_c between 100 and 1800),
  rated_kw double precision check (rated_kw between 0.1 and 1000),
  burner_kw double precision check (burner_kw between 0.1 and 3000),
  fuel text check (fuel in ('propane', 'natural-gas')),
  tariff_id uuid,
  note text not null default '' check (length(note) <= 2000),
  revision integer not null default 1 check (revision >= 1),
  created_at timestamptz(3) not null default now(),
  updated_at timestamptz(3) not null default now(),
  archived_at timestamptz(3),
  primary key (studio_id, id),
  foreign key (studio_id, tariff_id) references tariffs (studio_id, id),
  check (
    case energy
      when 'electric' then rated_kw is not null and burner_kw is null and fuel is null
      else burner_kw is not null and fuel is not null and rated_kw is null
    end
  )
);
create index furnaces_by_name on furnaces (studio_id, name_key, id);
create index furnaces_by_tariff on furnaces (studio_id, tariff_id);

grant select, insert, update on tariffs, thermocouples, kilns, furnaces to holdfast_app;
