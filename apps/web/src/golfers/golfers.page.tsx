import { useQuery, type QueryClient } from '@tanstack/react-query'
import { useState } from 'react'
import { Link, useParams, type LoaderFunctionArgs } from 'react-router'
import { sentenceOf } from '../api/problem'
import { useTitle } from '../layouts/accent'
import { useMay } from '../layouts/staff.layout'
import { paths } from '../paths'
import { Button } from '../ui/button'
import { Field } from '../ui/field'
import { PageHead } from '../ui/page-head'
import { EmptyState, ErrorState, SkeletonRows } from '../ui/states'
import { EnterGolfer } from './enter-golfer'
import { golfersQuery, type GolferInList } from './queries'
import { useSettled } from './use-settled'

export const loader =
  (client: QueryClient) =>
  ({ params }: LoaderFunctionArgs) =>
    client.query(golfersQuery(params['academy'] ?? '', '')).catch(() => undefined)

const STANDS_STILL_MS = 250

/** Everybody who plays here, found by name; and the way to enter somebody new. */
export default function GolfersPage() {
  const { academy: slug = '' } = useParams()
  const may = useMay()
  const [search, setSearch] = useState('')
  const [isEntering, setIsEntering] = useState(false)
  const wanted = useSettled(search.trim(), STANDS_STILL_MS)
  const golfers = useQuery({
    ...golfersQuery(slug, wanted),
    // While more is typed the names found so far stay; those of another academy never do.
    placeholderData: (before, query) => (query?.queryKey[0] === slug ? before : undefined),
  })
  useTitle('Golfers')
  return (
    <main id="main" className="wrap">
      <PageHead
        title="Golfers"
        sub={golfers.data && `${golfers.data.golfers.length} ${wanted ? 'found' : 'play here'}.`}
        actions={
          may('golfers:change') && (
            // While the form is open the yellow button is the one that sends it.
            <Button kind={isEntering ? 'plain' : 'go'} onClick={() => setIsEntering(!isEntering)}>
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
        <GolferTable slug={slug} golfers={golfers.data.golfers} />
      )}
    </main>
  )
}

function GolferTable({ slug, golfers }: { slug: string; golfers: readonly GolferInList[] }) {
  return (
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
          {golfers.map((golfer) => (
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
