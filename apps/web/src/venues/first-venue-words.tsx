import { InputWord, SelectWord } from '../ui/sentence'
import { AREA_KINDS, usualArea } from './area-words'
import type { FirstVenueDraft } from './keep-first-venue'

export interface WordsProps {
  draft: FirstVenueDraft
  onChange: (change: Partial<FirstVenueDraft>) => void
  errors: Readonly<Record<string, string>>
}

/** Where the venue lies: "53.8512 north, 6.2410 west". */
export function PositionWords({ draft, onChange, errors }: WordsProps) {
  return (
    <>
      <InputWord
        label="Latitude in degrees"
        value={draft.latitude}
        placeholder="53.8512"
        inputMode="decimal"
        isWrong={Boolean(errors['venue.latitudeDeg'])}
        onChange={(latitude) => onChange({ latitude })}
      />{' '}
      <SelectWord
        label="North or south"
        value={draft.northOrSouth}
        onChange={(northOrSouth) => onChange({ northOrSouth })}
        options={words('north', 'south')}
      />
      ,{' '}
      <InputWord
        label="Longitude in degrees"
        value={draft.longitude}
        placeholder="6.2410"
        inputMode="decimal"
        isWrong={Boolean(errors['venue.longitudeDeg'])}
        onChange={(longitude) => onChange({ longitude })}
      />{' '}
      <SelectWord
        label="East or west"
        value={draft.eastOrWest}
        onChange={(eastOrWest) => onChange({ eastOrWest })}
        options={words('east', 'west')}
      />
    </>
  )
}

/** What is taught on: "a range with 12 bays, lamps, covered". */
export function AreaWords({ draft, onChange, errors }: WordsProps) {
  const chooseKind = (kind: FirstVenueDraft['kind']) => {
    const { units, hasLamps, isCovered } = usualArea(kind)
    const lamps = hasLamps ? 'lamps' : 'no lamps'
    onChange({ kind, units: String(units), lamps, cover: isCovered ? 'covered' : 'open' })
  }
  return (
    <>
      <SelectWord label="Area" value={draft.kind} onChange={chooseKind} options={AREA_KINDS} /> with{' '}
      <InputWord
        label="Bays"
        type="number"
        min={1}
        max={200}
        value={draft.units}
        isWrong={Boolean(errors['area.units'])}
        onChange={(units) => onChange({ units })}
      />{' '}
      {draft.units === '1' ? 'bay' : 'bays'}
      {draft.kind !== 'indoor' && (
        <>
          ,{' '}
          <SelectWord
            label="Lamps"
            value={draft.lamps}
            onChange={(lamps) => onChange({ lamps })}
            options={words('lamps', 'no lamps')}
          />
        </>
      )}
      ,{' '}
      <SelectWord
        label="Cover"
        value={draft.cover}
        onChange={(cover) => onChange({ cover })}
        options={words('covered', 'open')}
      />
    </>
  )
}

/** Options that are shown as they are kept. */
function words<Value extends string>(...values: readonly Value[]) {
  return values.map((value) => ({ value, label: value }))
}
