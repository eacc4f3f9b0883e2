import { useState } from 'react'
import { useForm } from '../api/form'
import { Button } from '../ui/button'
import { Notice } from '../ui/notice'
import { toast } from '../ui/toast'
import {
  OwedFields,
  TaxFields,
  TimeFields,
  WordingFields,
  policiesOf,
  type Policies,
} from './policy-fields'
import { useChangeAcademy, type Academy } from './queries'
import { RefundTiers } from './refund-tiers'

const SHOWN = [
  'taxName',
  'taxBasisPoints',
  'refundTiers',
  'holdMinutes',
  'offerHours',
  'waiver',
  'safeguarding',
]

/** What golfers agree to and what it costs them to change their mind. */
export function PolicyForm({ academy }: { academy: Academy }) {
  const [wanted, setWanted] = useState(() => policiesOf(academy))
  const keep = useChangeAcademy(academy.slug)
  const send = async () => {
    await keep.mutateAsync(wanted)
    toast('Kept. It holds for places taken from now on.')
  }
  const { form, errors, sentence, isSending } = useForm(send, { beside: SHOWN })
  const set = (change: Partial<Policies>) => setWanted((had) => ({ ...had, ...change }))
  const fields = { wanted, set, errors }
  return (
    <section aria-labelledby="policies">
      <div className="sect">
        <h2 id="policies">Tax and policies</h2>
      </div>
      <form {...form} className="pt-4">
        {sentence && <Notice kind="flag">{sentence}</Notice>}
        <div className="kcols mt-0">
          <div>
            <TaxFields {...fields} />
            <RefundTiers
              tiers={wanted.refundTiers}
              onChange={(refundTiers) => set({ refundTiers })}
              errors={errors}
            />
            <OwedFields {...fields} />
          </div>
          <div>
            <TimeFields {...fields} />
            <WordingFields {...fields} />
          </div>
        </div>
        <Button type="submit" waiting={isSending && 'Keeping…'}>
          Save policies
        </Button>
      </form>
    </section>
  )
}
