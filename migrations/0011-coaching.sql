-- Swings, what they are measured against, and how an academy reads them.
--
-- Angles are degrees in tenths, of the lead wrist, with the signs of the International Society of
-- Biomechanics: flexion and ulnar deviation are positive. All of it is for the golfer's own hand: a
-- face is open or closed, a ball pulled or pushed, a path from inside to outside positive.

CREATE TABLE swings (
  academy_id uuid NOT NULL,
  id uuid NOT NULL,
  golfer_id uuid NOT NULL,
  -- In which it was recorded; null outside any.
  session_id uuid,
  recorded_by uuid REFERENCES accounts (id) ON DELETE SET NULL,
  recorded_at timestamptz NOT NULL,
  club text NOT NULL CHECK (club ~ '^[a-z0-9]+(-[a-z0-9]+)*$'),
  method text NOT NULL CHECK (method IN ('sensor', 'camera', 'goniometer', 'eye')),
  -- Of one reading, as it was agreed when the swing was recorded.
  error_deg numeric(4, 1) NOT NULL CHECK (error_deg BETWEEN 0.1 AND 30),
  address_flexion_deg numeric(4, 1) NOT NULL CHECK (address_flexion_deg BETWEEN -87.5 AND 100),
  address_ulnar_deg numeric(4, 1) NOT NULL CHECK (address_ulnar_deg BETWEEN -25 AND 37.5),
  top_flexion_deg numeric(4, 1) NOT NULL CHECK (top_flexion_deg BETWEEN -87.5 AND 100),
  top_ulnar_deg numeric(4, 1) NOT NULL CHECK (top_ulnar_deg BETWEEN -25 AND 37.5),
  impact_flexion_deg numeric(4, 1) NOT NULL CHECK (impact_flexion_deg BETWEEN -87.5 AND 100),
  impact_ulnar_deg numeric(4, 1) NOT NULL CHECK (impact_ulnar_deg BETWEEN -25 AND 37.5),
  -- What the ball did, as it was seen; null where nobody said.
  ball_start text CHECK (ball_start IN ('pulled', 'straight', 'pushed')),
  ball_curve text CHECK (ball_curve IN ('hook', 'draw', 'straight', 'fade', 'slice')),
  ball_height text CHECK (ball_height IN ('low', 'usual', 'high')),
  contact text CHECK (contact IN ('clean', 'fat', 'thin', 'heel', 'toe', 'shank')),
  distance_metres numeric(4, 1) CHECK (distance_metres BETWEEN 0 AND 400),
  -- What was measured of the club; null where nothing was.
  face_deg numeric(4, 1) CHECK (face_deg BETWEEN -45 AND 45),
  path_deg numeric(4, 1) CHECK (path_deg BETWEEN -30 AND 30),
  attack_deg numeric(4, 1) CHECK (attack_deg BETWEEN -20 AND 20),
  speed_mps numeric(4, 1) CHECK (speed_mps BETWEEN 1 AND 70),
  note text NOT NULL DEFAULT '',
  -- A swing that was recorded by mistake leaves every list and stays here.
  removed_at timestamptz,
  removed_by uuid REFERENCES accounts (id) ON DELETE SET NULL,
  PRIMARY KEY (academy_id, id),
  FOREIGN KEY (academy_id, golfer_id) REFERENCES golfers (academy_id, id) ON DELETE CASCADE,
  FOREIGN KEY (academy_id, session_id) REFERENCES sessions (academy_id, id)
    ON DELETE SET NULL (session_id),
  CHECK (removed_by IS NULL OR removed_at IS NOT NULL)
);
CREATE INDEX swings_newest ON swings (academy_id, golfer_id, recorded_at DESC, id DESC)
  WHERE removed_at IS NULL;
CREATE INDEX swings_session ON swings (academy_id, session_id);

-- One for each club, and one for all the others; an angle without a target is null.
CREATE TABLE swing_targets (
  academy_id uuid NOT NULL,
  id uuid NOT NULL,
  golfer_id uuid NOT NULL,
  club text CHECK (club ~ '^[a-z0-9]+(-[a-z0-9]+)*$'),
  address_flexion_deg numeric(4, 1) CHECK (address_flexion_deg BETWEEN -87.5 AND 100),
  address_ulnar_deg numeric(4, 1) CHECK (address_ulnar_deg BETWEEN -25 AND 37.5),
  top_flexion_deg numeric(4, 1) CHECK (top_flexion_deg BETWEEN -87.5 AND 100),
  top_ulnar_deg numeric(4, 1) CHECK (top_ulnar_deg BETWEEN -25 AND 37.5),
  impact_flexion_deg numeric(4, 1) CHECK (impact_flexion_deg BETWEEN -87.5 AND 100),
  impact_ulnar_deg numeric(4, 1) CHECK (impact_ulnar_deg BETWEEN -25 AND 37.5),
  set_by uuid REFERENCES accounts (id) ON DELETE SET NULL,
  set_at timestamptz NOT NULL,
  PRIMARY KEY (academy_id, id),
  CONSTRAINT swing_targets_one_each UNIQUE NULLS NOT DISTINCT (academy_id, golfer_id, club),
  FOREIGN KEY (academy_id, golfer_id) REFERENCES golfers (academy_id, id) ON DELETE CASCADE
);

-- An academy without a row reads swings as every academy does at first.
CREATE TABLE coaching_settings (
  academy_id uuid PRIMARY KEY REFERENCES academies ON DELETE CASCADE,
  tolerance_deg numeric(4, 1) NOT NULL CHECK (tolerance_deg BETWEEN 0 AND 15),
  sensor_error_deg numeric(4, 1) NOT NULL CHECK (sensor_error_deg BETWEEN 0.1 AND 30),
  camera_error_deg numeric(4, 1) NOT NULL CHECK (camera_error_deg BETWEEN 0.1 AND 30),
  goniometer_error_deg numeric(4, 1) NOT NULL CHECK (goniometer_error_deg BETWEEN 0.1 AND 30),
  eye_error_deg numeric(4, 1) NOT NULL CHECK (eye_error_deg BETWEEN 0.1 AND 30),
  extension_out_deg numeric(4, 1) NOT NULL CHECK (extension_out_deg BETWEEN 0 AND 90),
  radial_back_deg numeric(4, 1) NOT NULL CHECK (radial_back_deg BETWEEN 0 AND 60),
  changed_by uuid REFERENCES accounts (id) ON DELETE SET NULL,
  changed_at timestamptz NOT NULL
);

SELECT protect_tenant_table(name::regclass)
FROM unnest(ARRAY['swings', 'swing_targets', 'coaching_settings']) AS name;

-- What was measured is never changed; all that can happen to a swing is that it is taken out.
GRANT SELECT, INSERT, UPDATE (removed_at, removed_by) ON swings TO marram_app;
GRANT SELECT, INSERT, UPDATE ON swing_targets, coaching_settings TO marram_app;
