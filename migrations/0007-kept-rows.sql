-- What the product never deletes, its role cannot delete. Marks, consents and look-ups go with the
-- golfer or the place they are about, so whoever may delete those could rewrite history.

REVOKE DELETE ON
  accounts, venues, areas, coaches, invitations, golfers, enrolments, places, waitlist_entries
FROM marram_app;
