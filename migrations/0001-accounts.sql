-- People. An account is known before any academy is, so these tables are reference tables:
-- their keys do not start with academy_id and they have no row-level security.

CREATE TABLE accounts (
  id uuid PRIMARY KEY,
  email text NOT NULL UNIQUE CHECK (email = lower(email) AND length(email) <= 254),
  email_verified_at timestamptz,
  -- Null for a person who only ever signed in with an identity provider.
  password_hash text,
  name text NOT NULL CHECK (length(name) BETWEEN 1 AND 80),
  -- Raised to end every sign-in session at once.
  session_version integer NOT NULL DEFAULT 1,
  failed_sign_ins integer NOT NULL DEFAULT 0,
  may_try_at timestamptz,
  created_at timestamptz NOT NULL
);

-- A person at an identity provider, matched by issuer and subject and never by address.
CREATE TABLE account_identities (
  issuer text NOT NULL,
  subject text NOT NULL,
  account_id uuid NOT NULL REFERENCES accounts (id) ON DELETE CASCADE,
  created_at timestamptz NOT NULL,
  PRIMARY KEY (issuer, subject)
);
CREATE INDEX account_identities_account ON account_identities (account_id);

-- Links that act as keys: only the hash of their 32 random bytes is stored.
CREATE TABLE account_links (
  token_hash bytea PRIMARY KEY,
  account_id uuid NOT NULL REFERENCES accounts (id) ON DELETE CASCADE,
  purpose text NOT NULL CHECK (purpose IN ('verify', 'reset')),
  email text NOT NULL,
  expires_at timestamptz NOT NULL,
  used_at timestamptz,
  created_at timestamptz NOT NULL
);
CREATE INDEX account_links_account ON account_links (account_id, purpose);

CREATE TABLE sign_in_sessions (
  id_hash bytea PRIMARY KEY,
  account_id uuid REFERENCES accounts (id) ON DELETE CASCADE,
  session_version integer,
  data jsonb NOT NULL,
  expires_at timestamptz NOT NULL,
  created_at timestamptz NOT NULL
);
CREATE INDEX sign_in_sessions_account ON sign_in_sessions (account_id);
CREATE INDEX sign_in_sessions_expiry ON sign_in_sessions (expires_at);

-- Mail about a person's account; the unique key makes sending it again a no-op.
CREATE TABLE account_mails (
  business_key text PRIMARY KEY,
  account_id uuid REFERENCES accounts (id) ON DELETE CASCADE,
  recipient text NOT NULL,
  template text NOT NULL,
  provider_message_id text,
  sent_at timestamptz,
  created_at timestamptz NOT NULL
);

-- Addresses that bounced, refused or complained get no more mail.
CREATE TABLE silenced_addresses (
  email text PRIMARY KEY,
  reason text NOT NULL,
  silenced_at timestamptz NOT NULL
);

-- Webhook deliveries by the provider's own event id, so that a second delivery changes nothing.
CREATE TABLE provider_events (
  provider text NOT NULL CHECK (provider IN ('payments', 'mail')),
  event_id text NOT NULL,
  type text NOT NULL,
  account_ref text,
  received_at timestamptz NOT NULL,
  PRIMARY KEY (provider, event_id)
);

-- Attempts from one address or at one account, by window. Losing them in a crash costs nothing.
CREATE UNLOGGED TABLE attempts (
  subject text NOT NULL,
  window_starts_at timestamptz NOT NULL,
  count integer NOT NULL,
  PRIMARY KEY (subject, window_starts_at)
);
