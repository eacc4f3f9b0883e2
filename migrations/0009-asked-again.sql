-- When the provider was last asked for a refund, so that a pending one is asked after with growing
-- pauses.

ALTER TABLE refunds ADD COLUMN asked_at timestamptz;
UPDATE refunds SET asked_at = created_at;
ALTER TABLE refunds ALTER COLUMN asked_at SET NOT NULL;

GRANT SELECT (asked_at) ON refunds TO marram_dispatch;
