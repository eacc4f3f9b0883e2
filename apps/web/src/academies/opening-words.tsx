import { InputWord, SelectWord, Sentence } from '../ui/sentence'
import { CURRENCIES, zoneOptions, type Currency } from './zones'

export interface Opening {
  name: string
  place: string
  slug: string
  zone: string
  currency: Currency
  taxMode: 'included' | 'added'
}

/** "We are … in …": the first sentence, with its words to change. */
export function OpeningWords(props: {
  wanted: Opening
  onChange: (change: Partial<Opening>) => void
  errors: Readonly<Record<string, string>>
  isAddressFree: boolean
}) {
  const { wanted, onChange, errors, isAddressFree } = props
  return (
    <Sentence>
      We are{' '}
      <InputWord
        label="Name of the academy"
        value={wanted.name}
        placeholder="your academy"
        isWrong={Boolean(errors['name'])}
        onChange={(name) => onChange({ name })}
      />{' '}
      in{' '}
      <InputWord
        label="Place"
        value={wanted.place}
        placeholder="county or town"
        isWrong={Boolean(errors['place'])}
        onChange={(place) => onChange({ place })}
      />
      . Our page is {location.host}/
      <InputWord
        label="Address of the page"
        value={wanted.slug}
        placeholder="your-academy"
        isWrong={Boolean(errors['slug']) || !isAddressFree}
        onChange={(written) => onChange({ slug: written.toLowerCase() })}
      />
      . We keep{' '}
      <SelectWord
        label="Time zone"
        value={wanted.zone}
        onChange={(zone) => onChange({ zone })}
        options={zoneOptions}
      />{' '}
      and count in{' '}
      <SelectWord
        label="Currency"
        value={wanted.currency}
        onChange={(currency) => onChange({ currency })}
        options={CURRENCIES}
      />
      , with tax{' '}
      <SelectWord
        label="Tax"
        value={wanted.taxMode}
        onChange={(taxMode) => onChange({ taxMode })}
        options={[
          { value: 'included', label: 'in the price' },
          { value: 'added', label: 'added on top' },
        ]}
      />
      .
    </Sentence>
  )
}
