CREATE TABLE ledger_accounts (
  academy_id uuid NOT NULL REFERENCES academies ON DELETE RESTRICT,
  code text NOT NULL,
  PRIMARY KEY (academy_id, code)
);

CREATE TABLE transfers (
  academy_id uuid NOT NULL REFERENCES academies ON DELETE RESTRICT,
  id uuid NOT NULL,
  kind text NOT NULL,
  source_type text NOT NULL,
  source_id uuid NOT NULL,
  revision integer NOT NULL DEFAULT 0,
  -- What happened, for a reader: "Register closed, 5 present".
  what text NOT NULL,
  -- The true day, in the academy's zone.
  happened_on date NOT NULL,
  posted_at timestamptz NOT NULL,
  -- The database transaction that wrote it: all entries must come from the same one.
  written_in xid8 NOT NULL DEFAULT pg_current_xact_id(),
  PRIMARY KEY (academy_id, id),
  UNIQUE (academy_id, source_type, source_id, kind, revision)
);
CREATE INDEX transfers_by_day ON transfers (academy_id, happened_on);

CREATE TABLE entries (
  academy_id uuid NOT NULL,
  transfer_id uuid NOT NULL,
  position integer NOT NULL,
  account_code text NOT NULL,
  currency char(3) NOT NULL,
  -- Debit is positive, credit negative.
  amount_minor bigint NOT NULL CHECK (amount_minor <> 0),
  happened_on date NOT NULL,
  -- What it is about; the day the session is held decides the month in which it is earned.
  clinic_id uuid,
  session_id uuid,
  held_on date,
  PRIMARY KEY (academy_id, transfer_id, position),
  FOREIGN KEY (academy_id, transfer_id) REFERENCES transfers (academy_id, id) ON DELETE RESTRICT,
  FOREIGN KEY (academy_id, account_code)
    REFERENCES ledger_accounts (academy_id, code) ON DELETE RESTRICT
);
CREATE INDEX entries_by_account ON entries (academy_id, account_code, happened_on)
  INCLUDE (amount_minor, clinic_id, held_on);

CREATE TABLE orders (
  academy_id uuid NOT NULL,
  id uuid NOT NULL,
  enrolment_id uuid NOT NULL,
  account_id uuid REFERENCES accounts (id) ON DELETE SET NULL,
  -- open: may be paid. paid: money is in, or promised at the desk. void: nothing will come.
  state text NOT NULL CHECK (state IN ('open', 'paid', 'void')),
  method text NOT NULL CHECK (method IN ('card', 'desk')),
  currency char(3) NOT NULL,
  net_minor bigint NOT NULL CHECK (net_minor >= 0),
  tax_minor bigint NOT NULL CHECK (tax_minor >= 0),
  checkout_id text,
  checkout_url text,
  attempt integer NOT NULL DEFAULT 0,
  last_refusal text,
  created_at timestamptz NOT NULL,
  paid_at timestamptz,
  PRIMARY KEY (academy_id, id),
  FOREIGN KEY (academy_id, enrolment_id) REFERENCES enrolments (academy_id, id) ON DELETE RESTRICT
);
-- One order at a time asks for an enrolment's money.
CREATE UNIQUE INDEX orders_one_live ON orders (academy_id, enrolment_id) WHERE state <> 'void';
CREATE UNIQUE INDEX orders_checkout ON orders (academy_id, checkout_id);

CREATE TABLE payments (
  academy_id uuid NOT NULL,
  id uuid NOT NULL,
  order_id uuid NOT NULL,
  method text NOT NULL CHECK (method IN ('card', 'cash', 'transfer')),
  amount_minor bigint NOT NULL CHECK (amount_minor > 0),
  currency char(3) NOT NULL,
  provider_payment text,
  provider_fee_minor bigint NOT NULL DEFAULT 0,
  platform_fee_minor bigint NOT NULL DEFAULT 0,
  taken_by uuid REFERENCES accounts (id) ON DELETE SET NULL,
  taken_at timestamptz NOT NULL,
  PRIMARY KEY (academy_id, id),
  UNIQUE (academy_id, provider_payment),
  FOREIGN KEY (academy_id, order_id) REFERENCES orders (academy_id, id) ON DELETE RESTRICT
);
CREATE INDEX payments_order ON payments (academy_id, order_id);

-- Places the academy called off: what is owed and what the golfer chose.
CREATE TABLE owed_places (
  academy_id uuid NOT NULL,
  place_id uuid NOT NULL,
  amount_minor bigint NOT NULL CHECK (amount_minor >= 0),
  choice text CHECK (choice IN ('credit', 'money')),
  chosen_by text CHECK (chosen_by IN ('golfer', 'default')),
  choose_by timestamptz NOT NULL,
  settled_at timestamptz,
  PRIMARY KEY (academy_id, place_id),
  FOREIGN KEY (academy_id, place_id) REFERENCES places (academy_id, id) ON DELETE RESTRICT
);
CREATE INDEX owed_places_due ON owed_places (choose_by) WHERE choice IS NULL;

CREATE TABLE refunds (
  academy_id uuid NOT NULL,
  id uuid NOT NULL,
  order_id uuid NOT NULL,
  payment_id uuid,
  -- given-up, called-off, late-payment.
  reason text NOT NULL CHECK (reason IN ('given-up', 'called-off', 'late-payment')),
  -- What asked for it: an enrolment given up or a place called off; once each.
  source_id uuid NOT NULL,
  method text NOT NULL CHECK (method IN ('card', 'cash', 'credit')),
  amount_minor bigint NOT NULL CHECK (amount_minor > 0),
  currency char(3) NOT NULL,
  state text NOT NULL CHECK (state IN ('asked', 'done', 'failed')),
  provider_refund text,
  created_at timestamptz NOT NULL,
  done_at timestamptz,
  PRIMARY KEY (academy_id, id),
  UNIQUE (academy_id, reason, source_id),
  FOREIGN KEY (academy_id, order_id) REFERENCES orders (academy_id, id) ON DELETE RESTRICT,
  FOREIGN KEY (academy_id, payment_id) REFERENCES payments (academy_id, id) ON DELETE RESTRICT
);
CREATE INDEX refunds_order ON refunds (academy_id, order_id);

-- Money the academy owes a person, by change; the balance is its sum.
CREATE TABLE credit_changes (
  academy_id uuid NOT NULL,
  id uuid NOT NULL,
  golfer_id uuid NOT NULL,
  amount_minor bigint NOT NULL CHECK (amount_minor <> 0),
  currency char(3) NOT NULL,
  source_type text NOT NULL,
  source_id uuid NOT NULL,
  created_at timestamptz NOT NULL,
  PRIMARY KEY (academy_id, id),
  UNIQUE (academy_id, source_type, source_id),
  FOREIGN KEY (academy_id, golfer_id) REFERENCES golfers (academy_id, id) ON DELETE RESTRICT
);
CREATE INDEX credit_changes_golfer ON credit_changes (academy_id, golfer_id);

-- Mail to people of an academy; the unique key makes sending it again a no-op.
CREATE TABLE mails (
  academy_id uuid NOT NULL REFERENCES academies ON DELETE CASCADE,
  business_key text NOT NULL,
  recipient text NOT NULL,
  template text NOT NULL,
  provider_message_id text,
  sent_at timestamptz,
  created_at timestamptz NOT NULL,
  PRIMARY KEY (academy_id, business_key)
);

-- A transfer is whole at commit or not at all. Runs as a role that sees every row, since the
-- tenant setting of the transaction could be changed between the entries and the commit.
CREATE FUNCTION check_transfer() RETURNS trigger
LANGUAGE plpgsql SECURITY DEFINER SET search_path = pg_catalog, public AS $$
DECLARE
  of_academy uuid := NEW.academy_id;
  of_transfer uuid;
  parent record;
  lines integer;
BEGIN
  of_transfer := CASE TG_TABLE_NAME WHEN 'transfers' THEN (to_jsonb(NEW) ->> 'id')::uuid
                                    ELSE (to_jsonb(NEW) ->> 'transfer_id')::uuid END;
  SELECT written_in, happened_on INTO parent FROM public.transfers
    WHERE academy_id = of_academy AND id = of_transfer;
  IF parent.written_in <> pg_current_xact_id() THEN
    RAISE EXCEPTION 'transfer % was written earlier and takes no more entries', of_transfer
      USING ERRCODE = 'check_violation', CONSTRAINT = 'transfer_written_at_once';
  END IF;
  SELECT count(*) INTO lines FROM public.entries
    WHERE academy_id = of_academy AND transfer_id = of_transfer;
  IF lines < 2 THEN
    RAISE EXCEPTION 'transfer % has % entries, and needs two', of_transfer, lines
      USING ERRCODE = 'check_violation', CONSTRAINT = 'transfer_has_two_entries';
  END IF;
  IF EXISTS (
    SELECT 1 FROM public.entries WHERE academy_id = of_academy AND transfer_id = of_transfer
    GROUP BY currency HAVING sum(amount_minor) <> 0
  ) THEN
    RAISE EXCEPTION 'transfer % does not balance', of_transfer
      USING ERRCODE = 'check_violation', CONSTRAINT = 'transfer_balances';
  END IF;
  IF EXISTS (
    SELECT 1 FROM public.entries WHERE academy_id = of_academy AND transfer_id = of_transfer
      AND happened_on <> parent.happened_on
  ) THEN
    RAISE EXCEPTION 'transfer % has entries of another day', of_transfer
      USING ERRCODE = 'check_violation', CONSTRAINT = 'transfer_is_of_one_day';
  END IF;
  RETURN NULL;
END $$;

CREATE CONSTRAINT TRIGGER transfers_are_whole AFTER INSERT ON transfers
  DEFERRABLE INITIALLY DEFERRED FOR EACH ROW EXECUTE FUNCTION check_transfer();
CREATE CONSTRAINT TRIGGER entries_are_whole AFTER INSERT ON entries
  DEFERRABLE INITIALLY DEFERRED FOR EACH ROW EXECUTE FUNCTION check_transfer();
