import { useState } from 'react'
import type { Sent } from '@marram/contract'
import { call } from '../api/client'
import { useForm } from '../api/form'
import { useAcademyMutation } from '../api/mutation'
import { Button } from '../ui/button'
import { CheckField, Field, SelectField, TextArea } from '../ui/field'
import { Notice } from '../ui/notice'
import { toast } from '../ui/toast'
import type { Academy } from './queries'
import { RefundTiers } from './refund-tiers'

type Settings = Sent<'academies.change', 'body'>

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
  const [wanted, setWanted] = useState({
    taxMode: academy.taxMode,
    taxName: academy.taxName,
    taxBasisPoints: academy.taxBasisPoints,
    refundTiers: academy.refundTiers,
    waiver: academy.waiver,
    safeguarding: academy.safeguarding,
    holdMinutes: academy.holdMinutes,
    offerHours: academy.offerHours,
    duskKind: academy.duskKind,
    owedDefault: academy.owedDefault,
    canPayAtDesk: academy.canPayAtDesk,
  })
  const set = (change: Partial<typeof wanted>) => setWanted((had) => ({ ...had, ...change }))
  const keep = useAcademyMutation(academy.slug, (body: Settings) =>
    call('academies.change', { academy: academy.slug, body }),
  )
  const send = async () => {
    await keep.mutateAsync(wanted)
    toast('Kept. It holds for places taken from now on.')
  }
  const { form, errors, sentence, isSending } = useForm(send, { beside: SHOWN })
  return (
    <section aria-labelledby="policies">
      <div className="sect">
        <h2 id="policies">Tax and policies</h2>
      </div>
      <form {...form} className="pt-4">
        {sentence && <Notice kind="flag">{sentence}</Notice>}
        <div className="kcols mt-0">
          <div>
            <SelectField
              label="Tax"
              value={wanted.taxMode}
              options={[
                { value: 'included', label: 'In the price' },
                { value: 'added', label: 'Added on top' },
              ]}
              onChange={(taxMode) => set({ taxMode })}
            />
            <div className="f two">
              <Field
                label="What it is called"
                value={wanted.taxName}
                onChange={(event) => set({ taxName: event.target.value })}
                error={errors['taxName']}
              />
              <Field
                label="Rate in per cent"
                type="number"
                min={0}
                max={50}
                step={0.01}
                hint="Please check it with whoever does your books."
                value={wanted.taxBasisPoints / 100}
                onChange={(event) =>
                  set({ taxBasisPoints: Math.round(Number(event.target.value) * 100) })
                }
                error={errors['taxBasisPoints']}
              />
            </div>
            <RefundTiers
              tiers={wanted.refundTiers}
              onChange={(refundTiers) => set({ refundTiers })}
              errors={errors}
            />
            <SelectField
              label="When we call a session off and the golfer does not choose"
              value={wanted.owedDefault}
              options={[
                { value: 'credit', label: 'Credit after seven days' },
                { value: 'money', label: 'Money back after seven days' },
              ]}
              onChange={(owedDefault) => set({ owedDefault })}
            />
            <CheckField
              label="Golfers may pay at the desk"
              isChecked={wanted.canPayAtDesk}
              onChange={(canPayAtDesk) => set({ canPayAtDesk })}
            />
          </div>
          <div>
            <div className="f two">
              <Field
                label="A place is held for"
                hint="Minutes, while payment is made."
                type="number"
                min={5}
                max={60}
                value={wanted.holdMinutes}
                onChange={(event) => set({ holdMinutes: Number(event.target.value) })}
                error={errors['holdMinutes']}
              />
              <Field
                label="An offer stands for"
                hint="Hours, for who waits."
                type="number"
                min={1}
                max={72}
                value={wanted.offerHours}
                onChange={(event) => set({ offerHours: Number(event.target.value) })}
                error={errors['offerHours']}
              />
            </div>
            <SelectField
              label="Evenings end at"
              value={wanted.duskKind}
              options={[
                { value: 'sunset', label: 'Sunset' },
                { value: 'civil', label: 'The end of civil twilight' },
              ]}
              onChange={(duskKind) => set({ duskKind })}
            />
            <TextArea
              label="What golfers accept"
              rows={5}
              value={wanted.waiver}
              onChange={(event) => set({ waiver: event.target.value })}
              error={errors['waiver']}
            />
            <TextArea
              label="Safeguarding, shown where a child is enrolled"
              rows={5}
              value={wanted.safeguarding}
              onChange={(event) => set({ safeguarding: event.target.value })}
              error={errors['safeguarding']}
            />
          </div>
        </div>
        <Button type="submit" waiting={isSending && 'Keeping…'}>
          Save policies
        </Button>
      </form>
    </section>
  )
}
