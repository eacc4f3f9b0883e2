import { InputWord, SelectWord } from '../ui/sentence'
import { listOf } from './list-of'
import type { SentencePart } from './sentence-part'

type Area = SentencePart['venues'][number]['areas'][number]

const allOf = (area: Area | undefined) => ({
  areaId: area?.id ?? '',
  fromUnit: '1',
  toUnit: String(area?.units ?? 1),
})

/** "Skerrow Range, on the Bays 1 to 6 of 12, with Fintan Ash". */
export function WhereWords(props: SentencePart) {
  const { draft, onChange, venues, isWrong } = props
  const venue = venues.find(({ id }) => id === draft.venueId) ?? venues[0]
  const areas = venue?.areas ?? []
  const moreAreas = draft.moreAreas.map(({ areaId }) => areas.find(({ id }) => id === areaId))
  return (
    <>
      <SelectWord
        label="Venue"
        value={venue?.id ?? ''}
        onChange={(venueId) => {
          const next = venues.find(({ id }) => id === venueId)
          // Areas of another venue cannot come along.
          onChange({ venueId, ...allOf(next?.areas[0]), moreAreas: [] })
        }}
        options={venues.map(({ id, name }) => ({ value: id, label: name }))}
        isWrong={isWrong('venueId')}
      />
      , on the{' '}
      <SelectWord
        label="Area"
        value={draft.areaId}
        onChange={(areaId) => onChange(allOf(areas.find(({ id }) => id === areaId)))}
        options={areas.map(({ id, name }) => ({ value: id, label: name }))}
        isWrong={isWrong('areas')}
      />
      <BayWords {...props} area={areas.find(({ id }) => id === draft.areaId)} />
      {moreAreas.length > 0 && ` and the ${listOf(moreAreas.flatMap((area) => area?.name ?? []))}`},
      with <CoachWords {...props} />
    </>
  )
}

/** " bays 1 to 6 of 12", of an area that is divided. */
function BayWords(props: SentencePart & { area: Area | undefined }) {
  const { draft, onChange, area, isWrong } = props
  if (!area || area.units < 2) return null
  return (
    <>
      {' '}
      bays{' '}
      <InputWord
        label="First bay"
        type="number"
        min={1}
        max={area.units}
        value={draft.fromUnit}
        onChange={(fromUnit) => onChange({ fromUnit })}
        isWrong={isWrong('areas')}
      />{' '}
      to{' '}
      <InputWord
        label="Last bay"
        type="number"
        min={1}
        max={area.units}
        value={draft.toUnit}
        onChange={(toUnit) => onChange({ toUnit })}
        isWrong={isWrong('areas')}
      />{' '}
      of {area.units}
    </>
  )
}

/** "Fintan Ash and Orla Tarrant"; the first two can be changed, any more are kept. */
function CoachWords({ draft, onChange, coaches, isWrong }: SentencePart) {
  const [first = '', second = '', ...more] = draft.coachIds
  const choose = (ids: string[]) => onChange({ coachIds: [...new Set(ids.filter(Boolean))] })
  const names = more.flatMap((id) => coaches.find((coach) => coach.id === id)?.name ?? [])
  return (
    <>
      <SelectWord
        label="Coach"
        value={first}
        onChange={(coachId) => choose([coachId, second, ...more])}
        options={coaches.map(({ id, name }) => ({ value: id, label: name }))}
        isWrong={isWrong('coachIds')}
      />
      {coaches.length > 1 && (
        <>
          {' '}
          and{' '}
          <SelectWord
            label="Second coach"
            value={second}
            onChange={(coachId) => choose([first, coachId, ...more])}
            options={[
              { value: '', label: 'nobody else' },
              ...coaches
                .filter(({ id }) => id !== first)
                .map(({ id, name }) => ({ value: id, label: name })),
            ]}
            isWrong={isWrong('coachIds')}
          />
        </>
      )}
      {names.length > 0 && `, and ${listOf(names)}`}
    </>
  )
}
