import { useSuspenseQuery } from '@tanstack/react-query'
import type { QueryClient } from '@tanstack/react-query'
import { Link, useParams, useSearchParams, type LoaderFunctionArgs } from 'react-router'
import { makeFormat, taxInWords } from '../academies/format'
import { useAccent, useTitle } from '../layouts/accent'
import { PublicNav } from '../layouts/public-bar'
import { PublicFoot } from '../layouts/public-foot'
import { paths } from '../paths'
import { buttonClass } from '../ui/button'
import { Initials } from '../ui/initials'
import { placesLeft } from '../ui/place-ticks'
import { EmptyState } from '../ui/states'
import { ClinicFilter } from './clinic-filter'
import { ClinicLine } from './clinic-line'
import { NO_FILTER, filterClinics, filterOf, queryOf, type Filter } from './filter'
import { academyPageQuery, type AcademyPage, type PageClinic } from './queries'

export const loader =
  (client: QueryClient) =>
  ({ params }: LoaderFunctionArgs) =>
    client.query({ ...academyPageQuery(params['academy'] ?? ''), staleTime: 'static' })

export default function AcademyPageView() {
  const { academy: slug = '' } = useParams()
  const { data: page } = useSuspenseQuery(academyPageQuery(slug))
  const [query, setQuery] = useSearchParams()
  const filter = filterOf(query)
  // In the address, so that it is there again after Back; no step of its own, so that Back leaves.
  const setFilter = (next: Filter) =>
    setQuery(queryOf(next), { replace: true, preventScrollReset: true })
  const { academy } = page
  useAccent(academy)
  useTitle(`${academy.name}: golf clinics in ${academy.place}`)
  const shown = filterClinics(page.clinics, filter)
  return (
    <div className="pub">
      <PageTop page={page} />
      <main id="main" className="wrap public">
        {page.clinics.length === 0 ? (
          <EmptyState>No clinics on the page just now. Look again soon.</EmptyState>
        ) : (
          <>
            <ClinicFilter page={page} filter={filter} onChange={setFilter} />
            <ClinicMonths clinics={shown} academy={academy} />
            {shown.length === 0 && (
              <EmptyState
                action={
                  <button type="button" className="linkish" onClick={() => setFilter(NO_FILTER)}>
                    Show all {page.clinics.length} clinics
                  </button>
                }
              >
                No clinic fits all of that.
              </EmptyState>
            )}
          </>
        )}
        <Coaches page={page} />
      </main>
      <PublicFoot>
        {[academy.name, academy.address, taxInWords(academy)].filter(Boolean).join(', ')}. Times are
        the venue’s own.
      </PublicFoot>
    </div>
  )
}

function PageTop({ page }: { page: AcademyPage }) {
  const { academy, clinics } = page
  const next = clinics.find(({ taken, capacity }) => taken < capacity)
  return (
    <header className="pubhead">
      <svg className="dune" viewBox="0 0 1440 400" preserveAspectRatio="xMaxYMax slice" aria-hidden>
        <use href="/dune.svg#dune" />
      </svg>
      <div className="in">
        <PublicNav academy={academy} current="clinics" />
        <h1>{academy.name}</h1>
        <p className={next ? 'lead has' : 'lead'}>{academy.lead}</p>
        {next && (
          <p className="nextup">
            <Link
              className={buttonClass({ kind: 'go', isBig: true })}
              to={paths.clinic(academy.slug, next.slug)}
            >
              Take a place
            </Link>
            <span className="max-w-[9rem] leading-tight">
              <b>{next.title}</b>
              <br />
              {makeFormat({ ...academy, zone: next.zone }).day(next.startsAt)}, {placesLeft(next)}
            </span>
          </p>
        )}
      </div>
    </header>
  )
}

function ClinicMonths(props: { clinics: readonly PageClinic[]; academy: AcademyPage['academy'] }) {
  const months = new Map<string, PageClinic[]>()
  for (const clinic of props.clinics) {
    const month = monthOf(clinic, props.academy.locale)
    months.set(month, [...(months.get(month) ?? []), clinic])
  }
  return [...months].map(([month, clinics]) => (
    <section key={month} aria-label={month}>
      <div className="sect">
        <h2>{month}</h2>
        <span className="soft">
          {clinics.length} {clinics.length === 1 ? 'clinic' : 'clinics'}
        </span>
      </div>
      <ul className="fix">
        {clinics.map((clinic) => (
          <ClinicLine key={clinic.slug} clinic={clinic} academy={props.academy} />
        ))}
      </ul>
    </section>
  ))
}

function monthOf(clinic: PageClinic, locale: string): string {
  if (clinic.sessionsAhead < clinic.sessionsTotal) return 'Running now'
  const month = new Intl.DateTimeFormat(locale, { month: 'long', timeZone: clinic.zone })
  return `Starting in ${month.format(new Date(clinic.startsAt))}`
}

function Coaches({ page }: { page: AcademyPage }) {
  if (page.coaches.length === 0) return null
  return (
    <section className="kcols" aria-label="Coaches and getting here">
      <div>
        <div className="sh">
          <h2>Coaches</h2>
        </div>
        {page.coaches.map((coach) => (
          <p key={coach.name} className="py-2">
            <Initials of={coach.initials} /> <b>{coach.name}.</b> {coach.about}
          </p>
        ))}
      </div>
      <div>
        <div className="sh">
          <h2>Getting here</h2>
        </div>
        {page.venues.map((venue) => (
          <p key={venue.name} className="py-2">
            <b>{venue.name}.</b> {[venue.address, venue.gettingHere].filter(Boolean).join('. ')}
          </p>
        ))}
      </div>
    </section>
  )
}
