import { useQuery } from '@tanstack/react-query'
import { useState } from 'react'
import type { Answer, Sent } from '@marram/contract'
import type { Format } from '../academies/format'
import { call } from '../api/client'
import { useForm } from '../api/form'
import { useAcademyMutation } from '../api/mutation'
import { sentenceOf } from '../api/problem'
import { together } from '../api/together'
import { coachesQuery } from '../coaches/queries'
import { Button } from '../ui/button'
import { Field, SelectField } from '../ui/field'
import { Notice } from '../ui/notice'
import { ErrorState, SkeletonRows } from '../ui/states'
import { toast } from '../ui/toast'
import { venuesQuery } from '../venues/queries'
import type { Session } from './queries'
import { changeOf, wishOf, type SessionWish } from './session-wish'

/** All of its fields say beside themselves what is wrong. */
const SHOWN = {
  beside: ['startsOnLocal', 'startsAtLocal', 'durationMinutes', 'capacity', 'coachIds', 'areas'],
}

interface ChangeProps {
  academy: string
  session: Session
  format: Format
  onDone: () => void
}

/** One session's own time, places, coach and area. Its other coaches and areas stay as they are. */
export function ChangeSession(props: ChangeProps) {
  const coaches = useQuery(coachesQuery(props.academy))
  const venues = useQuery(venuesQuery(props.academy))
  const { error, retry } = together(coaches, venues)
  if (error) return <ErrorState sentence={sentenceOf(error)} onRetry={retry} />
  if (!coaches.data || !venues.data) return <SkeletonRows rows={4} />
  const [area] = props.session.areas
  const venue = venues.data.venues.find(({ areas }) => areas.some(({ id }) => id === area?.id))
  return <ChangeForm {...props} coaches={coaches.data.coaches} areas={venue?.areas ?? []} />
}

type Areas = Answer<'venues.list'>['venues'][number]['areas']

function ChangeForm(
  props: ChangeProps & { coaches: Answer<'coaches.list'>['coaches']; areas: Areas },
) {
  const { academy, session, format, onDone, coaches, areas } = props
  const [wish, setWish] = useState(() => wishOf(session, format.zone))
  const set = (part: Partial<SessionWish>) => setWish((had) => ({ ...had, ...part }))
  const change = useAcademyMutation(academy, (body: Sent<'sessions.change', 'body'>) =>
    call('sessions.change', { academy, params: { sessionId: session.id }, body }),
  )
  const { form, errors, sentence, isSending } = useForm(async () => {
    await change.mutateAsync(changeOf(wish, session))
    toast('Changed. Golfers get a mail where the time, the place or the coach is another.')
    onDone()
  }, SHOWN)
  return (
    <form {...form}>
      {sentence && <Notice kind="flag">{sentence}</Notice>}
      <TimeFields wish={wish} set={set} errors={errors} />
      <SelectField
        label="Coach"
        value={wish.coachId}
        onChange={(coachId) => set({ coachId })}
        options={coaches.map(({ id, name }) => ({ value: id, label: name }))}
        error={errors['coachIds']}
      />
      <AreaFields wish={wish} set={set} errors={errors} areas={areas} />
      <Button type="submit" kind="go" waiting={isSending && 'Changing…'}>
        Change this session
      </Button>
    </form>
  )
}

interface FieldsProps {
  wish: SessionWish
  set: (part: Partial<SessionWish>) => void
  errors: Readonly<Record<string, string>>
}

function TimeFields({ wish, set, errors }: FieldsProps) {
  return (
    <>
      <div className="f two">
        <Field
          label="Day"
          type="date"
          value={wish.startsOnLocal}
          onChange={(event) => set({ startsOnLocal: event.target.value })}
          error={errors['startsOnLocal']}
        />
        <Field
          label="Starts at"
          type="time"
          value={wish.startsAtLocal}
          onChange={(event) => set({ startsAtLocal: event.target.value })}
          error={errors['startsAtLocal']}
        />
      </div>
      <div className="f two">
        <Field
          label="Minutes"
          type="number"
          value={wish.durationMinutes}
          onChange={(event) => set({ durationMinutes: event.target.value })}
          error={errors['durationMinutes']}
        />
        <Field
          label="Places"
          type="number"
          value={wish.capacity}
          onChange={(event) => set({ capacity: event.target.value })}
          error={errors['capacity']}
        />
      </div>
    </>
  )
}

function AreaFields({ wish, set, errors, areas }: FieldsProps & { areas: Areas }) {
  const area = areas.find(({ id }) => id === wish.areaId)
  return (
    <>
      <SelectField
        label="Area"
        value={wish.areaId}
        onChange={(areaId) => {
          const units = areas.find(({ id }) => id === areaId)?.units ?? 1
          set({ areaId, fromUnit: '1', toUnit: String(units) })
        }}
        options={areas.map(({ id, name }) => ({ value: id, label: name }))}
        error={errors['areas']}
      />
      {area && area.units > 1 && (
        <div className="f two">
          <Field
            label={`From bay, of ${area.units}`}
            type="number"
            min={1}
            max={area.units}
            value={wish.fromUnit}
            onChange={(event) => set({ fromUnit: event.target.value })}
          />
          <Field
            label="To bay"
            type="number"
            min={1}
            max={area.units}
            value={wish.toUnit}
            onChange={(event) => set({ toUnit: event.target.value })}
          />
        </div>
      )}
    </>
  )
}
