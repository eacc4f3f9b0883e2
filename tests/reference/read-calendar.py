"""Reads a calendar part with the icalendar package and prints what another program makes of it.

Standard input is the text of the part; standard output is one JSON object. The occurrences of a
recurring entry are expanded with dateutil, in the zone by its name.
"""

import json
import sys

from dateutil.rrule import rrulestr
from icalendar import Calendar
from pytz import timezone
from pytz import utc as utc_zone


def utc(moment):
    return moment.astimezone(utc_zone).strftime("%Y-%m-%dT%H:%M:%S.000Z")


def excluded(event):
    found = event.get("EXDATE", [])
    lists = found if isinstance(found, list) else [found]
    return {utc(moment.dt) for one in lists for moment in one.dts}


def starts(event):
    begins = event["DTSTART"].dt
    if "RRULE" not in event:
        return [utc(begins)]
    # Expanded as local time: dateutil adds days to an instant, and misses the clock change.
    zone = begins.tzinfo.zone
    local = begins.replace(tzinfo=None)
    parts = event["RRULE"].to_ical().decode().split(";")
    rule = ";".join(part for part in parts if not part.startswith("UNTIL="))
    last = event["RRULE"]["UNTIL"][0].astimezone(timezone(zone)).replace(tzinfo=None)
    every = rrulestr(rule, dtstart=local).replace(until=last)
    moments = (utc(timezone(zone).localize(moment)) for moment in every)
    return [moment for moment in moments if moment not in excluded(event)]


def main():
    calendar = Calendar.from_ical(sys.stdin.buffer.read())
    events = calendar.walk("VEVENT")
    replaced = {
        utc(event["RECURRENCE-ID"].dt): utc(event["DTSTART"].dt)
        for event in events
        if "RECURRENCE-ID" in event
    }
    plain = [start for event in events if "RECURRENCE-ID" not in event for start in starts(event)]
    print(
        json.dumps(
            {
                "method": str(calendar["METHOD"]),
                "zones": [str(zone["TZID"]) for zone in calendar.walk("VTIMEZONE")],
                "uids": sorted({str(event["UID"]) for event in events}),
                "sequences": sorted({int(event["SEQUENCE"]) for event in events}),
                "organizers": sorted({str(event["ORGANIZER"]) for event in events}),
                "statuses": sorted({str(event["STATUS"]) for event in events}),
                "starts": sorted(replaced.get(start, start) for start in plain),
                "overrides": sorted(replaced.items()),
            }
        )
    )


main()
