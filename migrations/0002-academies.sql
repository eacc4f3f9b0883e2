-- The tenant and who belongs to it. From here on every table is a tenant table: its keys start
-- with academy_id, and row-level security is forced with a check.

CREATE TABLE academies (
  academy_id uuid PRIMARY KEY,
  slug text NOT NULL UNIQUE CHECK (slug ~ '^[a-z0-9]+(-[a-z0-9]+)*$'),
  name text NOT NULL,
  place text NOT NULL,
  lead text NOT NULL DEFAULT '',
  address text NOT NULL DEFAULT '',
  zone text NOT NULL,
  locale text NOT NULL,
  currency char(3) NOT NULL,
  accent text NOT NULL,
  accent_dusk text NOT NULL,
  tax_mode text NOT NULL CHECK (tax_mode IN ('included', 'added')),
  tax_name text NOT NULL,
  tax_basis_points integer NOT NULL CHECK (tax_basis_points BETWEEN 0 AND 5000),
  -- [{ noticeHours, refundBasisPoints }], most notice first.
  refund_tiers jsonb NOT NULL,
  waiver text NOT NULL,
  safeguarding text NOT NULL,
  hold_minutes integer NOT NULL CHECK (hold_minutes BETWEEN 5 AND 60),
  offer_hours integer NOT NULL CHECK (offer_hours BETWEEN 1 AND 72),
  dusk_kind text NOT NULL CHECK (dusk_kind IN ('sunset', 'civil')),
  owed_default text NOT NULL CHECK (owed_default IN ('credit', 'money')),
  can_pay_at_desk boolean NOT NULL,
  published_at timestamptz,
  payments_account text UNIQUE,
  payments_state text NOT NULL DEFAULT 'none'
    CHECK (payments_state IN ('none', 'started', 'ready')),
  created_at timestamptz NOT NULL
);

CREATE TABLE memberships (
  academy_id uuid NOT NULL REFERENCES academies ON DELETE CASCADE,
  account_id uuid NOT NULL REFERENCES accounts (id) ON DELETE CASCADE,
  role text NOT NULL CHECK (role IN ('owner', 'desk', 'coach', 'golfer', 'bookkeeper')),
  created_at timestamptz NOT NULL,
  PRIMARY KEY (academy_id, account_id, role)
);
CREATE INDEX memberships_account ON memberships (account_id);

CREATE TABLE venues (
  academy_id uuid NOT NULL REFERENCES academies ON DELETE CASCADE,
  id uuid NOT NULL,
  name text NOT NULL,
  address text NOT NULL DEFAULT '',
  getting_here text NOT NULL DEFAULT '',
  latitude_deg double precision NOT NULL CHECK (latitude_deg BETWEEN -89 AND 89),
  longitude_deg double precision NOT NULL CHECK (longitude_deg BETWEEN -180 AND 180),
  zone text NOT NULL,
  created_at timestamptz NOT NULL,
  PRIMARY KEY (academy_id, id)
);

CREATE TABLE areas (
  academy_id uuid NOT NULL,
  id uuid NOT NULL,
  venue_id uuid NOT NULL,
  name text NOT NULL,
  kind text NOT NULL CHECK (kind IN ('range', 'short-game', 'putting', 'indoor')),
  units integer NOT NULL CHECK (units BETWEEN 1 AND 200),
  has_lamps boolean NOT NULL,
  is_covered boolean NOT NULL,
  created_at timestamptz NOT NULL,
  PRIMARY KEY (academy_id, id),
  FOREIGN KEY (academy_id, venue_id) REFERENCES venues (academy_id, id) ON DELETE RESTRICT
);
CREATE INDEX areas_venue ON areas (academy_id, venue_id);

CREATE TABLE coaches (
  academy_id uuid NOT NULL REFERENCES academies ON DELETE CASCADE,
  id uuid NOT NULL,
  account_id uuid REFERENCES accounts (id) ON DELETE SET NULL,
  name text NOT NULL,
  initials text NOT NULL,
  about text NOT NULL DEFAULT '',
  created_at timestamptz NOT NULL,
  PRIMARY KEY (academy_id, id),
  UNIQUE (academy_id, account_id)
);

CREATE TABLE invitations (
  academy_id uuid NOT NULL REFERENCES academies ON DELETE CASCADE,
  id uuid NOT NULL,
  email text NOT NULL,
  role text NOT NULL CHECK (role IN ('owner', 'desk', 'coach', 'bookkeeper')),
  coach_id uuid,
  token_hash bytea NOT NULL,
  invited_by uuid REFERENCES accounts (id) ON DELETE SET NULL,
  expires_at timestamptz NOT NULL,
  accepted_at timestamptz,
  created_at timestamptz NOT NULL,
  PRIMARY KEY (academy_id, id),
  UNIQUE (academy_id, token_hash),
  FOREIGN KEY (academy_id, coach_id) REFERENCES coaches (academy_id, id) ON DELETE CASCADE
);
-- An invitation is looked up by its hash before its academy is known.
CREATE INDEX invitations_hash ON invitations (token_hash);

CREATE TABLE golfers (
  academy_id uuid NOT NULL REFERENCES academies ON DELETE CASCADE,
  id uuid NOT NULL,
  -- Set for a golfer who signs in; a dependant has a guardian instead, and one whom staff entered
  -- may have neither yet.
  account_id uuid REFERENCES accounts (id) ON DELETE SET NULL,
  guardian_account_id uuid REFERENCES accounts (id) ON DELETE SET NULL,
  name text NOT NULL,
  email text,
  phone text,
  born_on date,
  handicap numeric(4, 1) CHECK (handicap BETWEEN -10 AND 54),
  handicap_on date,
  hand text NOT NULL DEFAULT 'right' CHECK (hand IN ('right', 'left')),
  emergency_name text,
  emergency_phone text,
  notes text NOT NULL DEFAULT '',
  created_at timestamptz NOT NULL,
  PRIMARY KEY (academy_id, id),
  UNIQUE (academy_id, account_id),
  CHECK (account_id IS NULL OR guardian_account_id IS NULL)
);
CREATE INDEX golfers_guardian ON golfers (academy_id, guardian_account_id);

CREATE TABLE consents (
  academy_id uuid NOT NULL,
  id uuid NOT NULL,
  golfer_id uuid NOT NULL,
  kind text NOT NULL CHECK (kind IN ('takes-part', 'waiver', 'photo')),
  -- The words that were agreed to, so that a later change of the text changes nothing here.
  wording text NOT NULL,
  given_by uuid NOT NULL REFERENCES accounts (id) ON DELETE RESTRICT,
  given_at timestamptz NOT NULL,
  withdrawn_at timestamptz,
  PRIMARY KEY (academy_id, id),
  FOREIGN KEY (academy_id, golfer_id) REFERENCES golfers (academy_id, id) ON DELETE CASCADE
);
CREATE INDEX consents_golfer ON consents (academy_id, golfer_id);

-- Who of the staff looked at a minor's contacts and consents, and when.
CREATE TABLE minor_look_ups (
  academy_id uuid NOT NULL,
  id uuid NOT NULL,
  golfer_id uuid NOT NULL,
  account_id uuid NOT NULL REFERENCES accounts (id) ON DELETE RESTRICT,
  looked_at timestamptz NOT NULL,
  PRIMARY KEY (academy_id, id),
  FOREIGN KEY (academy_id, golfer_id) REFERENCES golfers (academy_id, id) ON DELETE CASCADE
);
