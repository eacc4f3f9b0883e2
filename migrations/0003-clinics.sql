CREATE TABLE clinics (
  academy_id uuid NOT NULL REFERENCES academies ON DELETE CASCADE,
  id uuid NOT NULL,
  slug text NOT NULL CHECK (slug ~ '^[a-z0-9]+(-[a-z0-9]+)*$'),
  title text NOT NULL,
  summary text NOT NULL,
  about text NOT NULL DEFAULT '',
  bring text NOT NULL DEFAULT '',
  handicap_min numeric(4, 1),
  handicap_max numeric(4, 1),
  age_min integer,
  age_max integer,
  capacity integer NOT NULL CHECK (capacity BETWEEN 1 AND 200),
  sale_mode text NOT NULL CHECK (sale_mode IN ('run', 'drop-in', 'both')),
  pay_mode text NOT NULL CHECK (pay_mode IN ('card', 'desk', 'free')),
  run_price_minor bigint CHECK (run_price_minor >= 0),
  drop_in_price_minor bigint CHECK (drop_in_price_minor >= 0),
  venue_id uuid NOT NULL,
  -- Copied from the venue, so that moving a venue's zone never moves a season already sold.
  zone text NOT NULL,
  starts_on_local date NOT NULL,
  starts_at_local time NOT NULL,
  duration_minutes integer NOT NULL CHECK (duration_minutes BETWEEN 15 AND 600),
  rrule text NOT NULL,
  skip_dates date[] NOT NULL DEFAULT '{}',
  state text NOT NULL DEFAULT 'draft' CHECK (state IN ('draft', 'published', 'withdrawn')),
  created_at timestamptz NOT NULL,
  PRIMARY KEY (academy_id, id),
  UNIQUE (academy_id, slug),
  FOREIGN KEY (academy_id, venue_id) REFERENCES venues (academy_id, id) ON DELETE RESTRICT,
  CHECK (pay_mode = 'free' OR sale_mode = 'drop-in' OR run_price_minor IS NOT NULL),
  CHECK (pay_mode = 'free' OR sale_mode = 'run' OR drop_in_price_minor IS NOT NULL)
);

CREATE TABLE clinic_coaches (
  academy_id uuid NOT NULL,
  clinic_id uuid NOT NULL,
  coach_id uuid NOT NULL,
  position integer NOT NULL,
  PRIMARY KEY (academy_id, clinic_id, coach_id),
  FOREIGN KEY (academy_id, clinic_id) REFERENCES clinics (academy_id, id) ON DELETE CASCADE,
  FOREIGN KEY (academy_id, coach_id) REFERENCES coaches (academy_id, id) ON DELETE RESTRICT
);

CREATE TABLE clinic_areas (
  academy_id uuid NOT NULL,
  clinic_id uuid NOT NULL,
  area_id uuid NOT NULL,
  position integer NOT NULL,
  from_unit integer NOT NULL CHECK (from_unit >= 1),
  to_unit integer NOT NULL,
  PRIMARY KEY (academy_id, clinic_id, area_id),
  CHECK (to_unit >= from_unit),
  FOREIGN KEY (academy_id, clinic_id) REFERENCES clinics (academy_id, id) ON DELETE CASCADE,
  FOREIGN KEY (academy_id, area_id) REFERENCES areas (academy_id, id) ON DELETE RESTRICT
);

CREATE TABLE sessions (
  academy_id uuid NOT NULL,
  id uuid NOT NULL,
  clinic_id uuid NOT NULL,
  -- Counted from 1 in order of date.
  number integer NOT NULL CHECK (number >= 1),
  held_on date NOT NULL,
  starts_at timestamptz NOT NULL,
  ends_at timestamptz NOT NULL,
  dusk_at timestamptz,
  capacity integer NOT NULL CHECK (capacity >= 1),
  held integer NOT NULL DEFAULT 0 CHECK (held >= 0),
  confirmed integer NOT NULL DEFAULT 0 CHECK (confirmed >= 0),
  state text NOT NULL DEFAULT 'planned' CHECK (state IN ('planned', 'called-off')),
  called_off_at timestamptz,
  called_off_reason text,
  register_state text NOT NULL DEFAULT 'open' CHECK (register_state IN ('open', 'closed')),
  register_revision integer NOT NULL DEFAULT 0,
  register_closed_at timestamptz,
  register_closed_by uuid REFERENCES accounts (id) ON DELETE SET NULL,
  -- Rises with every change that a calendar must learn of.
  calendar_sequence integer NOT NULL DEFAULT 0,
  PRIMARY KEY (academy_id, id),
  -- Deferred, so that a change of the dates may renumber a whole run.
  UNIQUE (academy_id, clinic_id, number) DEFERRABLE INITIALLY DEFERRED,
  CHECK (ends_at > starts_at),
  CONSTRAINT sessions_never_oversold CHECK (held + confirmed <= capacity),
  FOREIGN KEY (academy_id, clinic_id) REFERENCES clinics (academy_id, id) ON DELETE CASCADE
);
CREATE INDEX sessions_by_time ON sessions (academy_id, starts_at);
CREATE INDEX sessions_by_clinic ON sessions (academy_id, clinic_id, starts_at);

-- One coach is in one place at a time. Called-off sessions and drafts do not count.
CREATE TABLE session_coaches (
  academy_id uuid NOT NULL,
  session_id uuid NOT NULL,
  coach_id uuid NOT NULL,
  position integer NOT NULL,
  during tstzrange NOT NULL,
  is_live boolean NOT NULL,
  PRIMARY KEY (academy_id, session_id, coach_id),
  FOREIGN KEY (academy_id, session_id) REFERENCES sessions (academy_id, id) ON DELETE CASCADE,
  FOREIGN KEY (academy_id, coach_id) REFERENCES coaches (academy_id, id) ON DELETE RESTRICT,
  CONSTRAINT session_coaches_no_clash
    EXCLUDE USING gist (academy_id WITH =, coach_id WITH =, during WITH &&) WHERE (is_live)
);

-- Two groups share an area when their units differ.
CREATE TABLE session_areas (
  academy_id uuid NOT NULL,
  session_id uuid NOT NULL,
  area_id uuid NOT NULL,
  position integer NOT NULL,
  units int4range NOT NULL CHECK (NOT isempty(units)),
  during tstzrange NOT NULL,
  is_live boolean NOT NULL,
  PRIMARY KEY (academy_id, session_id, area_id),
  FOREIGN KEY (academy_id, session_id) REFERENCES sessions (academy_id, id) ON DELETE CASCADE,
  FOREIGN KEY (academy_id, area_id) REFERENCES areas (academy_id, id) ON DELETE RESTRICT,
  CONSTRAINT session_areas_no_clash EXCLUDE USING gist
    (academy_id WITH =, area_id WITH =, units WITH &&, during WITH &&) WHERE (is_live)
);
