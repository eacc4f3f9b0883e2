import { useQuery } from '@tanstack/react-query'
import { useState } from 'react'
import { ROLE_WORDS, roleWord, type StaffRole } from '../accounts/role-words'
import { useForm } from '../api/form'
import { sentenceOf } from '../api/problem'
import { Button } from '../ui/button'
import { Field, SelectField } from '../ui/field'
import { Notice } from '../ui/notice'
import { ErrorState, SkeletonRows } from '../ui/states'
import { toast } from '../ui/toast'
import { makeFormat } from './format'
import { staffQuery, useInvite, type Academy, type Staff } from './queries'
import { TakeAway, type Taken } from './take-away'

/** Who may do what here: the people, their roles, and invitations on their way. */
export function StaffSection({ slug, academy }: { slug: string; academy: Academy }) {
  const staff = useQuery(staffQuery(slug))
  const [taken, setTaken] = useState<Taken | null>(null)
  return (
    <section aria-labelledby="staff">
      <div className="sect">
        <h2 id="staff">Staff</h2>
      </div>
      {staff.isPending && <SkeletonRows rows={3} />}
      {staff.isError && (
        <ErrorState sentence={sentenceOf(staff.error)} onRetry={() => void staff.refetch()} />
      )}
      {staff.data && (
        <ul className="reg mb-4">
          {staff.data.staff.map((person) => (
            <Person key={person.accountId} person={person} onTake={setTaken} />
          ))}
          {staff.data.invitations.map((invitation) => (
            <Invited
              key={invitation.id}
              invitation={invitation}
              until={makeFormat(academy).day(invitation.expiresAt)}
              onTake={setTaken}
            />
          ))}
        </ul>
      )}
      <Invite slug={slug} />
      {taken && <TakeAway slug={slug} taken={taken} onClose={() => setTaken(null)} />}
    </section>
  )
}

interface RowProps {
  onTake: (taken: Taken) => void
}

function Person({ person, onTake }: RowProps & { person: Staff['staff'][number] }) {
  const { accountId, name, email, roles } = person
  return (
    <li className="waitrow">
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
                onClick={() => onTake({ kind: 'role', accountId, name, role })}
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
  )
}

function Invited(props: RowProps & { invitation: Staff['invitations'][number]; until: string }) {
  const { id, email, role } = props.invitation
  return (
    <li className="waitrow">
      <span>
        {email}
        <br />
        <span className="soft">
          Invited as {roleWord(role).toLowerCase()}, until {props.until}
        </span>
      </span>
      <button
        type="button"
        className="linkish"
        onClick={() => props.onTake({ kind: 'invitation', invitationId: id, email })}
      >
        Withdraw<span className="vh"> the invitation of {email}</span>
      </button>
    </li>
  )
}

function Invite({ slug }: { slug: string }) {
  const [email, setEmail] = useState('')
  const [role, setRole] = useState<StaffRole>('desk')
  const invite = useInvite(slug)
  const { form, errors, sentence, isSending } = useForm(
    async () => {
      await invite.mutateAsync({ email, role })
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
