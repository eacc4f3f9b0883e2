import { useState } from 'react'
import { useForm } from '../api/form'
import { useAcademyMutation } from '../api/mutation'
import { Button } from '../ui/button'
import { Notice } from '../ui/notice'
import { InputWord, Sentence } from '../ui/sentence'
import { AreaWords, PositionWords } from './first-venue-words'
import {
  WORD_NAMES,
  keepFirstVenue,
  type FirstVenueContext,
  type FirstVenueDraft,
} from './keep-first-venue'

const USUAL: FirstVenueDraft = {
  name: '',
  latitude: '',
  northOrSouth: 'north',
  longitude: '',
  eastOrWest: 'west',
  kind: 'range',
  units: '12',
  lamps: 'lamps',
  cover: 'covered',
  coach: '',
}

/** The second sentence: where teaching happens, and who does it. */
export function FirstVenue(props: FirstVenueContext) {
  const [draft, setDraft] = useState({ ...USUAL, coach: props.me.name })
  const change = (part: Partial<FirstVenueDraft>) => setDraft((had) => ({ ...had, ...part }))
  const keep = useAcademyMutation(props.slug, () => keepFirstVenue(props, draft))
  const { form, errors, sentence, isSending } = useForm(() => keep.mutateAsync(undefined), {
    named: WORD_NAMES,
  })
  const words = { draft, onChange: change, errors }
  return (
    <form {...form}>
      <Sentence>
        At{' '}
        <InputWord
          label="Name of the venue"
          value={draft.name}
          placeholder="your range or club"
          isWrong={Boolean(errors['venue.name'])}
          onChange={(name) => change({ name })}
        />
        , <PositionWords {...words} />. It has <AreaWords {...words} />.{' '}
        <InputWord
          label="Coach"
          value={draft.coach}
          isWrong={Boolean(errors['coach.name'])}
          onChange={(coach) => change({ coach })}
        />{' '}
        teaches.
      </Sentence>
      {sentence && <Notice kind="flag">{sentence}</Notice>}
      <p className="rowb2 mt-4">
        <Button type="submit" kind="go" isBig waiting={isSending && 'Keeping…'}>
          Keep the place
        </Button>
        <span className="soft">A map shows the two numbers when a point on it is pressed.</span>
      </p>
    </form>
  )
}
