-- A day is asked for by the calendar of the venue, which sessions carry with them.

CREATE INDEX sessions_by_day ON sessions (academy_id, held_on);
