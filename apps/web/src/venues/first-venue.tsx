import { useState, type SubmitEvent } from 'react'
import { call } from '../api/client'
import { useAcademyMutation } from '../api/mutation'
import { sentenceOf } from '../api/problem'
import { Button } from '../ui/button'
import { Notice } from '../ui/notice'
import { InputWord, SelectWord, Sentence } from '../ui/sentence'
import { AREA_KINDS, readDegrees, type AreaKind, type Venue } from './area-words'

interface Wanted {
  name: string
  latitude: string
  northOrSouth: 'north' | 'south'
  longitude: string
  eastOrWest: 'east' | 'west'
  kind: AreaKind
  units: string
  lamps: 'lamps' | 'no lamps'
  cover: 'covered' | 'open'
  coach: string
}

/** The second sentence: where teaching happens, and who does it. */
export function FirstVenue(props: {
  slug: string
  me: { name: string; email: string }
  /** What an earlier try got as far as keeping. */
  kept: { venue: Venue | undefined; hasCoach: boolean }
}) {
  const [wanted, setWanted] = useState<Wanted>({
    name: '',
    latitude: '',
    northOrSouth: 'north',
    longitude: '',
    eastOrWest: 'west',
    kind: 'range',
    units: '12',
    lamps: 'lamps',
    cover: 'covered',
    coach: props.me.name,
  })
  const [error, setError] = useState('')
  const set = (change: Partial<Wanted>) => setWanted((had) => ({ ...had, ...change }))
  const keep = useAcademyMutation(props.slug, () => keepVenue(props, wanted))

  const submit = async (event: SubmitEvent) => {
    event.preventDefault()
    setError('')
    if (readDegrees(wanted.latitude) === null || readDegrees(wanted.longitude) === null) {
      setError('Sunset needs the place in degrees, like 53.8512 north and 6.2410 west.')
      return
    }
    try {
      await keep.mutateAsync(undefined)
    } catch (caught) {
      setError(sentenceOf(caught))
    }
  }
  const chooseKind = (kind: AreaKind) => {
    const usual = AREA_KINDS.find(({ value }) => value === kind)
    set({
      kind,
      units: String(usual?.units ?? 1),
      lamps: usual?.hasLamps ? 'lamps' : 'no lamps',
      cover: usual?.isCovered ? 'covered' : 'open',
    })
  }

  return (
    <form onSubmit={(event) => void submit(event)} noValidate>
      <Sentence>
        At{' '}
        <InputWord
          label="Name of the venue"
          value={wanted.name}
          placeholder="your range or club"
          onChange={(name) => set({ name })}
        />
        ,{' '}
        <InputWord
          label="Latitude in degrees"
          value={wanted.latitude}
          placeholder="53.8512"
          inputMode="decimal"
          onChange={(latitude) => set({ latitude })}
        />{' '}
        <SelectWord
          label="North or south"
          value={wanted.northOrSouth}
          onChange={(side) => set({ northOrSouth: side as Wanted['northOrSouth'] })}
          options={['north', 'south'].map((value) => ({ value, label: value }))}
        />
        ,{' '}
        <InputWord
          label="Longitude in degrees"
          value={wanted.longitude}
          placeholder="6.2410"
          inputMode="decimal"
          onChange={(longitude) => set({ longitude })}
        />{' '}
        <SelectWord
          label="East or west"
          value={wanted.eastOrWest}
          onChange={(side) => set({ eastOrWest: side as Wanted['eastOrWest'] })}
          options={['east', 'west'].map((value) => ({ value, label: value }))}
        />
        . It has{' '}
        <SelectWord
          label="Area"
          value={wanted.kind}
          onChange={(kind) => chooseKind(kind as AreaKind)}
          options={AREA_KINDS}
        />{' '}
        with{' '}
        <InputWord
          label="Bays"
          type="number"
          min={1}
          max={200}
          value={wanted.units}
          onChange={(units) => set({ units })}
        />{' '}
        {wanted.units === '1' ? 'bay' : 'bays'}
        {wanted.kind !== 'indoor' && (
          <>
            ,{' '}
            <SelectWord
              label="Lamps"
              value={wanted.lamps}
              onChange={(lamps) => set({ lamps: lamps as Wanted['lamps'] })}
              options={['lamps', 'no lamps'].map((value) => ({ value, label: value }))}
            />
          </>
        )}
        ,{' '}
        <SelectWord
          label="Cover"
          value={wanted.cover}
          onChange={(cover) => set({ cover: cover as Wanted['cover'] })}
          options={['covered', 'open'].map((value) => ({ value, label: value }))}
        />
        . <InputWord label="Coach" value={wanted.coach} onChange={(coach) => set({ coach })} />{' '}
        teaches.
      </Sentence>
      {error && <Notice kind="flag">{error}</Notice>}
      <p className="rowb2 mt-4">
        <Button type="submit" kind="go" isBig waiting={keep.isPending && 'Keeping…'}>
          Keep the place
        </Button>
        <span className="soft">A map shows the two numbers when a point on it is pressed.</span>
      </p>
    </form>
  )
}

/** Goes on where an earlier try stopped, so that nothing is kept twice. */
async function keepVenue(
  { slug, me, kept }: Pick<Parameters<typeof FirstVenue>[0], 'slug' | 'me' | 'kept'>,
  wanted: Wanted,
) {
  const side = (text: string, isNegative: boolean) =>
    (readDegrees(text) ?? 0) * (isNegative ? -1 : 1)
  const venue =
    kept.venue ??
    (await call('venues.add', {
      academy: slug,
      body: {
        name: wanted.name,
        latitudeDeg: side(wanted.latitude, wanted.northOrSouth === 'south'),
        longitudeDeg: side(wanted.longitude, wanted.eastOrWest === 'west'),
      },
    }))
  const usual = AREA_KINDS.find(({ value }) => value === wanted.kind)
  if (venue.areas.length === 0) {
    await call('areas.add', {
      academy: slug,
      params: { venueId: venue.id },
      body: {
        name: usual?.name ?? 'Area',
        kind: wanted.kind,
        units: Number(wanted.units),
        hasLamps: wanted.lamps === 'lamps',
        isCovered: wanted.cover === 'covered',
      },
    })
  }
  if (kept.hasCoach) return
  const isMe = wanted.coach.trim() === me.name
  await call('coaches.add', {
    academy: slug,
    body: { name: wanted.coach, ...(isMe ? { invite: me.email } : {}) },
  })
}
