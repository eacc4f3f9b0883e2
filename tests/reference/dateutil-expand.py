"""Expands recurrence rules with python-dateutil, for comparison.

Reads from standard input a JSON list of {rule, start, zone, limit}: an RRULE whose times are local,
the local start "2026-04-06T18:00", an IANA zone. Writes a JSON list of lists of pairs: the local
time, and the seconds since 1970 of its instant by RFC 5545 (a time in a gap moves on by the gap,
one that occurs twice is the first), by the zone files of the system.
"""

import json
import sys
import warnings
from datetime import datetime
from itertools import islice
from zoneinfo import ZoneInfo

from dateutil.rrule import rrulestr

HORIZON_YEARS = 50

# COUNT with UNTIL is against RFC 5545, and still the only horizon there is.
warnings.simplefilter("ignore", DeprecationWarning)


def expand(case):
    start = datetime.strptime(case["start"], "%Y-%m-%dT%H:%M")
    rule = rrulestr(case["rule"], dtstart=start)
    # A rule that never matches would be sought until the year 9999.
    if rule._until is None:
        horizon = start.replace(year=start.year + HORIZON_YEARS, day=min(start.day, 28))
        rule = rule.replace(until=horizon)
    # Not dateutil's own zones: it is hours off where summer time is the standard, as in Dublin, and
    # knows no change after 2037. A fold of 0 is the offset before a gap and the first of two.
    zone = ZoneInfo(case["zone"])
    dates = []
    for date in islice(rule, case["limit"]):
        instant = date.replace(tzinfo=zone, fold=0).timestamp()
        dates.append([date.strftime("%Y-%m-%dT%H:%M"), int(instant)])
    return dates


json.dump([expand(case) for case in json.load(sys.stdin)], sys.stdout)
