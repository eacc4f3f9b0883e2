import { useState } from 'react'
import { useNavigate } from 'react-router'
import { useForm } from '../api/form'
import { paths } from '../paths'
import { Button } from '../ui/button'
import { Field } from '../ui/field'
import { Notice } from '../ui/notice'
import { useEnterGolfer } from './queries'

/** Enters somebody who has no account; their page opens afterwards. */
export function EnterGolfer({ slug, onDone }: { slug: string; onDone: () => void }) {
  const navigate = useNavigate()
  const [fields, setFields] = useState({ name: '', email: '', phone: '', handicap: '' })
  const set = (change: Partial<typeof fields>) => setFields((had) => ({ ...had, ...change }))
  const enter = useEnterGolfer(slug)
  const send = async () => {
    const golfer = await enter.mutateAsync({
      name: fields.name,
      ...(fields.email ? { email: fields.email } : {}),
      ...(fields.phone ? { phone: fields.phone } : {}),
      ...(fields.handicap ? { handicap: Number(fields.handicap.replace(',', '.')) } : {}),
    })
    onDone()
    await navigate(paths.golfer(slug, golfer.id))
  }
  const { form, errors, sentence, isSending } = useForm(send, {
    beside: ['name', 'email', 'phone', 'handicap'],
  })
  return (
    <form {...form} className="panel mb-6 max-w-[38rem]">
      <div className="pad">
        {sentence && <Notice kind="flag">{sentence}</Notice>}
        <Field
          label="Name"
          value={fields.name}
          onChange={(event) => set({ name: event.target.value })}
          error={errors['name']}
        />
        <div className="f two">
          <Field
            label="E-mail"
            type="email"
            hint="If they have one"
            value={fields.email}
            onChange={(event) => set({ email: event.target.value })}
            error={errors['email']}
          />
          <Field
            label="Telephone"
            type="tel"
            value={fields.phone}
            onChange={(event) => set({ phone: event.target.value })}
            error={errors['phone']}
          />
        </div>
        <Field
          label="Handicap"
          inputMode="decimal"
          value={fields.handicap}
          onChange={(event) => set({ handicap: event.target.value })}
          error={errors['handicap']}
        />
        <div className="actions">
          <Button type="submit" kind="go" waiting={isSending && 'Entering…'}>
            Enter them
          </Button>
          <Button onClick={onDone}>Not now</Button>
        </div>
      </div>
    </form>
  )
}
