CREATE TABLE enrolments (
  academy_id uuid NOT NULL,
  id uuid NOT NULL,
  clinic_id uuid NOT NULL,
  golfer_id uuid NOT NULL,
  -- Who took it and answers for it; null when staff gave it to a golfer without an account.
  taken_by uuid REFERENCES accounts (id) ON DELETE SET NULL,
  kind text NOT NULL CHECK (kind IN ('run', 'session')),
  state text NOT NULL CHECK (state IN ('held', 'confirmed', 'cancelled')),
  ended_because text CHECK (ended_because IN ('lapsed', 'given-up', 'called-off', 'let-go')),
  is_offer boolean NOT NULL DEFAULT false,
  held_until timestamptz,
  -- The price agreed at that moment; later changes of the clinic's price leave it alone.
  currency char(3) NOT NULL,
  net_minor bigint NOT NULL CHECK (net_minor >= 0),
  tax_minor bigint NOT NULL CHECK (tax_minor >= 0),
  pay_mode text NOT NULL CHECK (pay_mode IN ('card', 'desk', 'free')),
  created_at timestamptz NOT NULL,
  ended_at timestamptz,
  PRIMARY KEY (academy_id, id),
  FOREIGN KEY (academy_id, clinic_id) REFERENCES clinics (academy_id, id) ON DELETE RESTRICT,
  FOREIGN KEY (academy_id, golfer_id) REFERENCES golfers (academy_id, id) ON DELETE RESTRICT,
  CHECK ((state = 'held') = (held_until IS NOT NULL)),
  CHECK ((state = 'cancelled') = (ended_because IS NOT NULL))
);
CREATE INDEX enrolments_due ON enrolments (held_until) WHERE state = 'held';
CREATE INDEX enrolments_clinic ON enrolments (academy_id, clinic_id);
CREATE INDEX enrolments_golfer ON enrolments (academy_id, golfer_id);
CREATE INDEX enrolments_taken_by ON enrolments (academy_id, taken_by);

CREATE TABLE places (
  academy_id uuid NOT NULL,
  id uuid NOT NULL,
  enrolment_id uuid NOT NULL,
  session_id uuid NOT NULL,
  golfer_id uuid NOT NULL,
  state text NOT NULL CHECK (state IN ('held', 'confirmed', 'cancelled')),
  ended_because text CHECK (ended_because IN ('lapsed', 'given-up', 'called-off', 'let-go')),
  -- This session's share of the price, allocated once and never divided again.
  net_minor bigint NOT NULL CHECK (net_minor >= 0),
  tax_minor bigint NOT NULL CHECK (tax_minor >= 0),
  PRIMARY KEY (academy_id, id),
  FOREIGN KEY (academy_id, enrolment_id) REFERENCES enrolments (academy_id, id) ON DELETE CASCADE,
  FOREIGN KEY (academy_id, session_id) REFERENCES sessions (academy_id, id) ON DELETE RESTRICT,
  FOREIGN KEY (academy_id, golfer_id) REFERENCES golfers (academy_id, id) ON DELETE RESTRICT,
  CHECK ((state = 'cancelled') = (ended_because IS NOT NULL))
);
CREATE UNIQUE INDEX places_one_while_active ON places (academy_id, session_id, golfer_id)
  WHERE state <> 'cancelled';
CREATE INDEX places_enrolment ON places (academy_id, enrolment_id);
CREATE INDEX places_session ON places (academy_id, session_id);

CREATE TABLE waitlist_entries (
  academy_id uuid NOT NULL,
  id uuid NOT NULL,
  clinic_id uuid NOT NULL,
  -- Null for the whole run.
  session_id uuid,
  golfer_id uuid NOT NULL,
  account_id uuid NOT NULL REFERENCES accounts (id) ON DELETE CASCADE,
  state text NOT NULL CHECK (state IN ('waiting', 'offered', 'taken', 'passed', 'left')),
  enrolment_id uuid,
  joined_at timestamptz NOT NULL,
  PRIMARY KEY (academy_id, id),
  FOREIGN KEY (academy_id, clinic_id) REFERENCES clinics (academy_id, id) ON DELETE CASCADE,
  FOREIGN KEY (academy_id, session_id) REFERENCES sessions (academy_id, id) ON DELETE CASCADE,
  FOREIGN KEY (academy_id, golfer_id) REFERENCES golfers (academy_id, id) ON DELETE CASCADE,
  FOREIGN KEY (academy_id, enrolment_id) REFERENCES enrolments (academy_id, id) ON DELETE SET NULL (enrolment_id),
  CHECK ((state = 'offered') <= (enrolment_id IS NOT NULL))
);
CREATE UNIQUE INDEX waitlist_once_for_run ON waitlist_entries (academy_id, clinic_id, golfer_id)
  WHERE session_id IS NULL AND state IN ('waiting', 'offered');
CREATE UNIQUE INDEX waitlist_once_for_session
  ON waitlist_entries (academy_id, session_id, golfer_id)
  WHERE session_id IS NOT NULL AND state IN ('waiting', 'offered');
CREATE INDEX waitlist_queue ON waitlist_entries (academy_id, clinic_id, joined_at, id)
  WHERE state = 'waiting';

CREATE TABLE marks (
  academy_id uuid NOT NULL,
  place_id uuid NOT NULL,
  session_id uuid NOT NULL,
  mark text NOT NULL CHECK (mark IN ('present', 'late', 'absent', 'excused')),
  marked_by uuid NOT NULL REFERENCES accounts (id) ON DELETE RESTRICT,
  -- By our clock, and by the clock of the phone it was pressed on.
  marked_at timestamptz NOT NULL,
  pressed_at timestamptz,
  PRIMARY KEY (academy_id, place_id),
  FOREIGN KEY (academy_id, place_id) REFERENCES places (academy_id, id) ON DELETE CASCADE,
  FOREIGN KEY (academy_id, session_id) REFERENCES sessions (academy_id, id) ON DELETE CASCADE
);
CREATE INDEX marks_session ON marks (academy_id, session_id);

-- Every press, so that who marked what and when is never lost.
CREATE TABLE mark_history (
  academy_id uuid NOT NULL,
  id uuid NOT NULL,
  place_id uuid NOT NULL,
  mark text CHECK (mark IN ('present', 'late', 'absent', 'excused')),
  marked_by uuid NOT NULL REFERENCES accounts (id) ON DELETE RESTRICT,
  marked_at timestamptz NOT NULL,
  pressed_at timestamptz,
  PRIMARY KEY (academy_id, id),
  FOREIGN KEY (academy_id, place_id) REFERENCES places (academy_id, id) ON DELETE CASCADE
);
CREATE INDEX mark_history_place ON mark_history (academy_id, place_id);
