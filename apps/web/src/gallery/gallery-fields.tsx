import { useState } from 'react'
import { CheckField, Field, SelectField, TextArea } from '../ui/field'
import { Picks } from '../ui/picks'
import { InputWord, SelectWord, Sentence } from '../ui/sentence'

const DAYS = ['Tuesday', 'Thursday'].map((value) => ({ value, label: value }))

/** Entry in all its forms: a sentence, fields at rest and wrong, choices with a refusal. */
export function GalleryFields() {
  const [day, setDay] = useState('Tuesday')
  const [time, setTime] = useState('18:00')
  const [isChecked, setIsChecked] = useState(true)
  const [pick, setPick] = useState('run')
  return (
    <>
      <Sentence>
        Every <SelectWord label="Day" value={day} onChange={setDay} options={DAYS} /> at{' '}
        <InputWord label="Start time" type="time" value={time} onChange={setTime} /> for{' '}
        <InputWord label="Golfers" type="number" value="" onChange={() => undefined} isWrong />{' '}
        golfers.
      </Sentence>
      <div className="kcols">
        <div>
          <Field label="Your name" hint="As on your card." defaultValue="Ines Falk" />
          <Field
            label="E-mail"
            defaultValue="ines@links"
            error="This address is missing its ending, like .com or .ie."
          />
          <SelectField label="Level" value={day} options={DAYS} onChange={setDay} />
        </div>
        <div>
          <TextArea label="Anything we should know" rows={3} />
          <CheckField
            label="I have read what I accept"
            isChecked={isChecked}
            onChange={setIsChecked}
          />
          <Picks
            legend="What"
            value={pick}
            onChange={setPick}
            picks={[
              { value: 'run', title: 'The whole run', detail: '8 Tuesdays', amount: '€108.00' },
              { value: 'one', title: 'One session', amount: '€18.00' },
              { value: 'no', title: 'Kit', refusal: 'Is 9; this clinic is for 13 and up.' },
            ]}
          />
        </div>
      </div>
    </>
  )
}
