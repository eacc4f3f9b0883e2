import { useQuery } from '@tanstack/react-query'
import { useState } from 'react'
import type { Sent } from '@marram/contract'
import { call } from '../api/client'
import { useForm } from '../api/form'
import { useAcademyMutation } from '../api/mutation'
import { sentenceOf } from '../api/problem'
import { Button } from '../ui/button'
import { Field, SelectField } from '../ui/field'
import { Notice } from '../ui/notice'
import { SkeletonRows } from '../ui/states'
import { toast } from '../ui/toast'
import { makeFormat } from './format'
import { staffQuery, type Academy } from './queries'

type StaffRole = Sent<'invitations.send', 'body'>['role']

const ROLE_WORDS = [
  { value: 'desk', label: 'Front desk' },
  { value: 'coach', label: 'Coach' },
  { value: 'bookkeeper', label: 'Bookkeeper' },
  { value: 'owner', label: 'Owner' },
] as const

const roleWord = (role: string) => ROLE_WORDS.find(({ value }) => value === role)?.label ?? role

/** Who may do what here: the people, their roles, and invitations on their way. */
export function StaffSection({ slug, academy }: { slug: string; academy: Academy }) {
  const format = makeFormat(academy)
  const { data } = useQuery(staffQuery(slug))
  const remove = useAcademyMutation(slug, (who: { accountId: string; role: StaffRole }) =>
    call('staff.remove', { academy: slug, params: who }),
  )
  if (!data) return <SkeletonRows rows={3} />
  return (
    <section aria-labelledby="staff">
      <div className="sect">
        <h2 id="staff">Staff</h2>
      </div>
      {remove.error && <Notice kind="flag">{sentenceOf(remove.error)}</Notice>}
      <ul className="reg mb-4">
        {data.staff.map(({ accountId, name, email, roles }) => (
          <li key={accountId} className="waitrow">
            <span>
              <b>{name}</b>
              <br />
              <span className="soft">{email}</span>
            </span>
            <span className="actions">
              {roles
                .filter((role): role is StaffRole => role !== 'golfer')
                .map((role) => (
                  <span key={role}>
                    {roleWord(role)}{' '}
                    <button
                      type="button"
                      className="linkish"
                      onClick={() => remove.mutate({ accountId, role })}
                    >
                      Take away
                      <span className="vh">
                        {' '}
                        {roleWord(role)} from {name}
                      </span>
                    </button>
                  </span>
                ))}
            </span>
          </li>
        ))}
        {data.invitations.map(({ id, email, role, expiresAt }) => (
          <li key={id} className="waitrow">
            <span>
              {email}
              <br />
              <span className="soft">
                Invited as {roleWord(role).toLowerCase()}, until {format.day(expiresAt)}
              </span>
            </span>
          </li>
        ))}
      </ul>
      <Invite slug={slug} />
    </section>
  )
}

function Invite({ slug }: { slug: string }) {
  const [email, setEmail] = useState('')
  const [role, setRole] = useState<StaffRole>('desk')
  const send = useAcademyMutation(slug, () =>
    call('invitations.send', { academy: slug, body: { email, role } }),
  )
  const { form, errors, sentence, isSending } = useForm(
    async () => {
      await send.mutateAsync(undefined)
      toast(`${email} gets a mail with an invitation.`)
      setEmail('')
    },
    { beside: ['email'] },
  )
  return (
    <form {...form} className="inline-form">
      {sentence && <Notice kind="flag">{sentence}</Notice>}
      <Field
        label="Invite"
        type="email"
        placeholder="name@example.com"
        value={email}
        onChange={(event) => setEmail(event.target.value)}
        error={errors['email']}
      />
      <SelectField label="As" value={role} options={ROLE_WORDS} onChange={setRole} />
      <Button type="submit" waiting={isSending && 'Sending…'}>
        Send invitation
      </Button>
    </form>
  )
}
