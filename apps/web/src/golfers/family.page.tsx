import { useSuspenseQuery, type QueryClient } from '@tanstack/react-query'
import { useState } from 'react'
import { useParams, type LoaderFunctionArgs } from 'react-router'
import { SignOut } from '../accounts/sign-out'
import { useForm } from '../api/form'
import { academyPageQuery } from '../clinics/queries'
import { useTitle } from '../layouts/accent'
import { Button } from '../ui/button'
import { Notice } from '../ui/notice'
import { toast } from '../ui/toast'
import { DEPENDANT_FIELDS, DependantFields, EMPTY_DEPENDANT, toDependant } from './dependant-fields'
import { myGolfersQuery, useAddDependant } from './queries'

export const loader =
  (client: QueryClient) =>
  ({ params }: LoaderFunctionArgs) => {
    const slug = params['academy'] ?? ''
    return Promise.all([
      client.query({ ...myGolfersQuery(slug), staleTime: 'static' }),
      client.query({ ...academyPageQuery(slug), staleTime: 'static' }),
    ])
  }

/** Those the person looks after here, and themselves. */
export default function FamilyPage() {
  const { academy: slug = '' } = useParams()
  const { data } = useSuspenseQuery(myGolfersQuery(slug))
  const { data: page } = useSuspenseQuery(academyPageQuery(slug))
  useTitle(`Family – ${page.academy.name}`)
  const [isAdding, setIsAdding] = useState(false)
  return (
    <main id="main" className="wrap narrow">
      <div className="head">
        <h1>Family</h1>
      </div>
      <ul className="reg mb-5">
        {data.golfers.map((golfer) => (
          <li key={golfer.id} className="waitrow">
            <span>
              <b>{golfer.name}</b>
              <br />
              <span className="soft">
                {[
                  golfer.isMe ? 'You' : '',
                  golfer.ageYears === null ? '' : `${golfer.ageYears} years`,
                  golfer.handicap === null ? '' : `handicap ${golfer.handicap}`,
                  golfer.emergencyContact ? `call ${golfer.emergencyContact.name}` : '',
                ]
                  .filter(Boolean)
                  .join(', ')}
              </span>
            </span>
          </li>
        ))}
        {data.golfers.length === 0 && (
          <li className="waitrow">
            Nobody yet. Add someone you look after, or take a place for yourself.
          </li>
        )}
      </ul>
      {isAdding ? (
        <AddDependant
          slug={slug}
          safeguarding={page.academy.safeguarding}
          onDone={() => setIsAdding(false)}
        />
      ) : (
        <Button onClick={() => setIsAdding(true)}>Add someone you look after</Button>
      )}
      <SignOut />
    </main>
  )
}

function AddDependant(props: { slug: string; safeguarding: string; onDone: () => void }) {
  const [draft, setDraft] = useState(EMPTY_DEPENDANT)
  const add = useAddDependant(props.slug)
  const { form, errors, sentence, isSending } = useForm(
    async () => {
      const golfer = await add.mutateAsync(toDependant(draft))
      toast(`${golfer.name} is in your family here.`)
      props.onDone()
    },
    { beside: DEPENDANT_FIELDS },
  )
  return (
    <form {...form} className="panel max-w-[34rem]">
      <div className="pad">
        {sentence && <Notice kind="flag">{sentence}</Notice>}
        <DependantFields
          draft={draft}
          onChange={setDraft}
          errors={errors}
          prefix=""
          safeguarding={props.safeguarding}
        />
        <div className="actions">
          <Button type="submit" kind="go" waiting={isSending && 'Adding…'}>
            Add them
          </Button>
          <Button onClick={props.onDone}>Not now</Button>
        </div>
      </div>
    </form>
  )
}
