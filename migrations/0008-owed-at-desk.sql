-- What of an order is still to be paid at the desk, by the ledger: what was sold, less what came in
-- and what is no longer owed, since a place was called off or given up. The view reads as whoever
-- asks, so that row-level security is theirs.

CREATE VIEW owed_at_desk WITH (security_invoker = true) AS
SELECT o.academy_id, o.id AS order_id, o.enrolment_id, (
  SELECT coalesce(sum(n.amount_minor), 0)::bigint
  FROM transfers t
  JOIN entries n ON n.academy_id = t.academy_id AND n.transfer_id = t.id
  WHERE t.academy_id = o.academy_id AND n.account_code = 'receivable'
    AND t.source_type IN ('order', 'payment', 'place', 'enrolment')
    AND t.source_id IN (
      SELECT o.id
      UNION ALL SELECT o.enrolment_id
      UNION ALL SELECT y.id FROM payments y
        WHERE y.academy_id = o.academy_id AND y.order_id = o.id
      UNION ALL SELECT p.id FROM places p
        WHERE p.academy_id = o.academy_id AND p.enrolment_id = o.enrolment_id)
) AS owed_minor
FROM orders o
WHERE o.method = 'desk';

GRANT SELECT ON owed_at_desk TO marram_app;
