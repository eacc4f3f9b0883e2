import { useState } from 'react'
import { call } from '../api/client'
import { useForm } from '../api/form'
import { useAcademyMutation } from '../api/mutation'
import { Button } from '../ui/button'
import { Notice } from '../ui/notice'
import { InputWord, SelectWord, Sentence } from '../ui/sentence'
import { AREA_KINDS, usualArea, type AreaKind, type Venue } from './area-words'
import { readPosition } from './position'

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
  const set = (change: Partial<Wanted>) => setWanted((had) => ({ ...had, ...change }))
  const keep = useAcademyMutation(props.slug, () => keepVenue(props, wanted))

  const { form, all, isSending } = useForm(() => keep.mutateAsync(undefined))
  const chooseKind = (kind: AreaKind) => {
    const { units, hasLamps, isCovered } = usualArea(kind)
    set({
      kind,
      units: String(units),
      lamps: hasLamps ? 'lamps' : 'no lamps',
      cover: isCovered ? 'covered' : 'open',
    })
  }

  return (
    <form {...form}>
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
          onChange={(side) => set({ northOrSouth: side })}
          options={words('north', 'south')}
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
          onChange={(side) => set({ eastOrWest: side })}
          options={words('east', 'west')}
        />
        . It has{' '}
        <SelectWord label="Area" value={wanted.kind} onChange={chooseKind} options={AREA_KINDS} />{' '}
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
              onChange={(lamps) => set({ lamps })}
              options={words('lamps', 'no lamps')}
            />
          </>
        )}
        ,{' '}
        <SelectWord
          label="Cover"
          value={wanted.cover}
          onChange={(cover) => set({ cover })}
          options={words('covered', 'open')}
        />
        . <InputWord label="Coach" value={wanted.coach} onChange={(coach) => set({ coach })} />{' '}
        teaches.
      </Sentence>
      {all && <Notice kind="flag">{all}</Notice>}
      <p className="rowb2 mt-4">
        <Button type="submit" kind="go" isBig waiting={isSending && 'Keeping…'}>
          Keep the place
        </Button>
        <span className="soft">A map shows the two numbers when a point on it is pressed.</span>
      </p>
    </form>
  )
}

/** Options that are shown as they are kept. */
function words<Value extends string>(...values: readonly Value[]) {
  return values.map((value) => ({ value, label: value }))
}

/** Goes on where an earlier try stopped, so that nothing is kept twice. */
async function keepVenue(
  { slug, me, kept }: Pick<Parameters<typeof FirstVenue>[0], 'slug' | 'me' | 'kept'>,
  wanted: Wanted,
) {
  const { latitudeDeg, longitudeDeg } = readPosition(wanted)
  const venue =
    kept.venue ??
    (await call('venues.add', {
      academy: slug,
      body: {
        name: wanted.name,
        latitudeDeg: wanted.northOrSouth === 'south' ? -latitudeDeg : latitudeDeg,
        longitudeDeg: wanted.eastOrWest === 'west' ? -longitudeDeg : longitudeDeg,
      },
    }))
  if (venue.areas.length === 0) {
    await call('areas.add', {
      academy: slug,
      params: { venueId: venue.id },
      body: {
        ...usualArea(wanted.kind),
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
