import { useQuery } from '@tanstack/react-query'
import { useDeferredValue, useState } from 'react'
import { Link, useNavigate, useParams } from 'react-router'
import type { Sent } from '@marram/contract'
import { call } from '../api/client'
import { useForm } from '../api/form'
import { useAcademyMutation } from '../api/mutation'
import { routeQuery } from '../api/query'
import { sentenceOf } from '../api/problem'
import { useTitle } from '../layouts/accent'
import { useMay } from '../layouts/staff.layout'
import { paths } from '../paths'
import { Button } from '../ui/button'
import { Field } from '../ui/field'
import { Notice } from '../ui/notice'
import { PageHead } from '../ui/page-head'
import { EmptyState, ErrorState, SkeletonRows } from '../ui/states'

/** Everybody who plays here, found by name; and the way to enter somebody new. */
export default function GolfersPage() {
  const { academy: slug = '' } = useParams()
  const may = useMay()
  const [search, setSearch] = useState('')
  const [isEntering, setIsEntering] = useState(false)
  const wanted = useDeferredValue(search.trim())
  const golfers = useQuery(
    routeQuery('golfers.list', { academy: slug, query: wanted ? { search: wanted } : {} }),
  )
  useTitle('Golfers')
  return (
    <main id="main" className="wrap">
      <PageHead
        title="Golfers"
        sub={golfers.data && `${golfers.data.golfers.length} ${wanted ? 'found' : 'play here'}.`}
        actions={
          may('golfers:change') && (
            <Button kind="go" onClick={() => setIsEntering(!isEntering)}>
              Enter a golfer
            </Button>
          )
        }
      />
      {isEntering && <EnterGolfer slug={slug} onDone={() => setIsEntering(false)} />}
      <div className="max-w-[24rem]">
        <Field
          label="Find by name"
          type="search"
          value={search}
          onChange={(event) => setSearch(event.target.value)}
        />
      </div>
      {golfers.isError ? (
        <ErrorState sentence={sentenceOf(golfers.error)} onRetry={() => void golfers.refetch()} />
      ) : !golfers.data ? (
        <div className="card">
          <SkeletonRows rows={8} />
        </div>
      ) : golfers.data.golfers.length === 0 ? (
        <EmptyState>
          {wanted
            ? `Nobody called “${wanted}”.`
            : 'Nobody yet. Golfers appear here when they take a place.'}
        </EmptyState>
      ) : (
        <div className="card">
          <table className="sc stack">
            <thead>
              <tr>
                <th scope="col">Golfer</th>
                <th scope="col" className="l">
                  E-mail
                </th>
                <th scope="col">Handicap</th>
                <th scope="col" className="l">
                  Guardian
                </th>
                <th scope="col">Sessions ahead</th>
              </tr>
            </thead>
            <tbody>
              {golfers.data.golfers.map((golfer) => (
                <tr key={golfer.id}>
                  <th scope="row">
                    <Link to={paths.golfer(slug, golfer.id)}>{golfer.name}</Link>
                    {golfer.isJunior && <small>Junior</small>}
                  </th>
                  <Cell label="" value={golfer.email} isText />
                  <Cell label="Handicap" value={golfer.handicap} />
                  <Cell label="Guardian" value={golfer.guardianName} isText />
                  <Cell label="Sessions ahead" value={golfer.placesAhead || null} />
                </tr>
              ))}
            </tbody>
          </table>
        </div>
      )}
    </main>
  )
}

/** A cell of the list; on a phone it carries its own label, and is left out where it holds nothing. */
function Cell(props: { label: string; value: string | number | null; isText?: boolean }) {
  const { label, value, isText } = props
  const name = [isText ? 'l' : '', value === null ? 'none' : ''].join(' ').trim()
  return (
    <td className={name || undefined} data-label={label || undefined}>
      {value ?? '–'}
    </td>
  )
}

function EnterGolfer({ slug, onDone }: { slug: string; onDone: () => void }) {
  const navigate = useNavigate()
  const [fields, setFields] = useState({ name: '', email: '', phone: '', handicap: '' })
  const enter = useAcademyMutation(slug, (body: Sent<'golfers.enter', 'body'>) =>
    call('golfers.enter', { academy: slug, body }),
  )
  const set = (change: Partial<typeof fields>) => setFields({ ...fields, ...change })
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
