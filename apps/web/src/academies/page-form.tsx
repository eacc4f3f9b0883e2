import { useState } from 'react'
import { useForm } from '../api/form'
import { Button } from '../ui/button'
import { Field, SelectField, TextArea } from '../ui/field'
import { Notice } from '../ui/notice'
import { toast } from '../ui/toast'
import { ACCENTS, accentName } from './accents'
import { useChangeAcademy, type Academy } from './queries'

/** What the public page says about the academy, and in what colour. */
export function PageForm({ academy }: { academy: Academy }) {
  const [wanted, setWanted] = useState({
    name: academy.name,
    place: academy.place,
    lead: academy.lead,
    address: academy.address,
    accent: accentName(academy.accent),
  })
  const set = (change: Partial<typeof wanted>) => setWanted((had) => ({ ...had, ...change }))
  const keep = useChangeAcademy(academy.slug)
  const send = async () => {
    const { accent: name, ...rest } = wanted
    const chosen = ACCENTS.find((each) => each.name === name)
    const colours = chosen ? { accent: chosen.accent, accentDusk: chosen.accentDusk } : {}
    await keep.mutateAsync({ ...rest, ...colours })
    toast('Kept. The page shows it now.')
  }
  const { form, errors, sentence, isSending } = useForm(send, {
    beside: ['name', 'place', 'lead', 'address'],
  })
  return (
    <section aria-labelledby="the-page">
      <div className="sect">
        <h2 id="the-page">The page</h2>
      </div>
      <form {...form} className="pt-4">
        {sentence && <Notice kind="flag">{sentence}</Notice>}
        <div className="kcols mt-0 mb-3">
          <div>
            <Field
              label="Name"
              value={wanted.name}
              onChange={(event) => set({ name: event.target.value })}
              error={errors['name']}
            />
            <Field
              label="Place"
              value={wanted.place}
              onChange={(event) => set({ place: event.target.value })}
              error={errors['place']}
            />
            <SelectField
              label="Accent"
              hint="On the top edge, the name and the pennon. Each can be read in both lights."
              value={wanted.accent}
              options={[
                ...ACCENTS.map(({ name }) => ({ value: name, label: name })),
                ...(accentName(academy.accent) === 'Own'
                  ? [{ value: 'Own', label: 'As it is' }]
                  : []),
              ]}
              onChange={(accent) => set({ accent })}
            />
          </div>
          <div>
            <TextArea
              label="Under the name"
              hint="One sentence or two."
              rows={3}
              value={wanted.lead}
              onChange={(event) => set({ lead: event.target.value })}
              error={errors['lead']}
            />
            <TextArea
              label="Address"
              rows={2}
              value={wanted.address}
              onChange={(event) => set({ address: event.target.value })}
              error={errors['address']}
            />
          </div>
        </div>
        <Button type="submit" waiting={isSending && 'Keeping…'}>
          Save the page
        </Button>
      </form>
    </section>
  )
}
