import { useQuery } from '@tanstack/react-query'
import { useState } from 'react'
import type { Sent } from '@marram/contract'
import type { Format } from '../academies/format'
import { coachesQuery, venuesQuery } from '../academies/queries'
import { call } from '../api/client'
import { useForm } from '../api/form'
import { useAcademyMutation } from '../api/mutation'
import { Button } from '../ui/button'
import { Field, SelectField } from '../ui/field'
import { Notice } from '../ui/notice'
import { toast } from '../ui/toast'
import type { Session } from './queries'

type Body = Sent<'sessions.change', 'body'>

/** One session's own time, places, coach and area. Its other coaches and areas stay as they are. */
export function ChangeSession(props: {
  academy: string
  session: Session
  format: Format
  onDone: () => void
}) {
  const { academy, session, format, onDone } = props
  const coaches = useQuery(coachesQuery(academy))
  const venues = useQuery(venuesQuery(academy))
  const [wanted, setWanted] = useState(() => wantedOf(session, format.zone))
  const set = (part: Partial<typeof wanted>) => setWanted((had) => ({ ...had, ...part }))
  const [firstArea] = session.areas
  const venue = venues.data?.venues.find(({ areas }) =>
    areas.some(({ id }) => id === firstArea?.id),
  )
  const area = venue?.areas.find(({ id }) => id === wanted.areaId)
  const change = useAcademyMutation(academy, (body: Body) =>
    call('sessions.change', { academy, params: { sessionId: session.id }, body }),
  )
  const { form, errors, sentence, isSending } = useForm(async () => {
    await change.mutateAsync(bodyOf(wanted, session))
    toast('Changed. Golfers get a mail where the time, the place or the coach is another.')
    onDone()
  })
  return (
    <form {...form}>
      {sentence && <Notice kind="flag">{sentence}</Notice>}
      <div className="f two">
        <Field
          label="Day"
          type="date"
          value={wanted.startsOnLocal}
          onChange={(event) => set({ startsOnLocal: event.target.value })}
          error={errors['startsOnLocal']}
        />
        <Field
          label="Starts at"
          type="time"
          value={wanted.startsAtLocal}
          onChange={(event) => set({ startsAtLocal: event.target.value })}
          error={errors['startsAtLocal']}
        />
      </div>
      <div className="f two">
        <Field
          label="Minutes"
          type="number"
          value={wanted.durationMinutes}
          onChange={(event) => set({ durationMinutes: event.target.value })}
          error={errors['durationMinutes']}
        />
        <Field
          label="Places"
          type="number"
          value={wanted.capacity}
          onChange={(event) => set({ capacity: event.target.value })}
          error={errors['capacity']}
        />
      </div>
      <SelectField
        label="Coach"
        value={wanted.coachId}
        onChange={(coachId) => set({ coachId })}
        options={(coaches.data?.coaches ?? []).map(({ id, name }) => ({ value: id, label: name }))}
      />
      <SelectField
        label="Area"
        value={wanted.areaId}
        onChange={(areaId) => {
          const units = venue?.areas.find(({ id }) => id === areaId)?.units ?? 1
          set({ areaId, fromUnit: '1', toUnit: String(units) })
        }}
        options={(venue?.areas ?? []).map(({ id, name }) => ({ value: id, label: name }))}
      />
      {area && area.units > 1 && (
        <div className="f two">
          <Field
            label={`From bay, of ${area.units}`}
            type="number"
            min={1}
            max={area.units}
            value={wanted.fromUnit}
            onChange={(event) => set({ fromUnit: event.target.value })}
          />
          <Field
            label="To bay"
            type="number"
            min={1}
            max={area.units}
            value={wanted.toUnit}
            onChange={(event) => set({ toUnit: event.target.value })}
          />
        </div>
      )}
      <Button type="submit" kind="go" waiting={isSending && 'Changing…'}>
        Change this session
      </Button>
    </form>
  )
}

type Wanted = ReturnType<typeof wantedOf>

function wantedOf(session: Session, timeZone: string) {
  const [coach] = session.coaches
  const [area] = session.areas
  const startsAt = new Date(session.startsAt)
  const clock = { timeZone, hour: '2-digit', minute: '2-digit' } as const
  return {
    startsOnLocal: new Intl.DateTimeFormat('en-CA', { timeZone }).format(startsAt),
    startsAtLocal: new Intl.DateTimeFormat('en-GB', clock).format(startsAt),
    durationMinutes: String((Date.parse(session.endsAt) - startsAt.getTime()) / 60_000),
    capacity: String(session.capacity),
    coachId: coach?.id ?? '',
    areaId: area?.id ?? '',
    fromUnit: String(area?.fromUnit ?? 1),
    toUnit: String(area?.toUnit ?? 1),
  }
}

/** Only what is another than before is sent: what is not sent stays. */
function bodyOf(wanted: Wanted, session: Session): Body {
  const [coach, ...moreCoaches] = session.coaches
  const [area, ...moreAreas] = session.areas
  const fromUnit = Number(wanted.fromUnit)
  const toUnit = Number(wanted.toUnit)
  const isSameArea =
    area?.id === wanted.areaId && area.fromUnit === fromUnit && area.toUnit === toUnit
  return {
    startsOnLocal: wanted.startsOnLocal,
    startsAtLocal: wanted.startsAtLocal,
    durationMinutes: Number(wanted.durationMinutes),
    capacity: Number(wanted.capacity),
    ...(coach?.id === wanted.coachId
      ? {}
      : { coachIds: [wanted.coachId, ...moreCoaches.map(({ id }) => id)] }),
    ...(isSameArea
      ? {}
      : {
          areas: [
            { areaId: wanted.areaId, fromUnit, toUnit },
            ...moreAreas.map((each) => ({
              areaId: each.id,
              fromUnit: each.fromUnit,
              toUnit: each.toUnit,
            })),
          ],
        }),
  }
}
