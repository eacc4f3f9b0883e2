import { Link } from 'react-router'
import { levelInWords, makeFormat, type Format } from '../academies/format'
import { paths } from '../paths'
import { PlaceTicks, placesLeft } from '../ui/place-ticks'
import { listOf } from './list-of'
import type { AcademyFace, PageClinic } from './queries'

/** One clinic in one line of sight: day, name, where and who, places, price. */
export function ClinicLine({ clinic, academy }: { clinic: PageClinic; academy: AcademyFace }) {
  const format = makeFormat({ ...academy, zone: clinic.zone })
  const isFull = clinic.taken >= clinic.capacity
  return (
    <li>
      <div className="day">
        {format.day(clinic.startsAt)}
        <small>{format.range(clinic)}</small>
      </div>
      <div className="mid">
        <h3>
          <Link to={paths.clinic(academy.slug, clinic.slug)}>{clinic.title}</Link>
        </h3>
        <p>{clinic.summary || levelInWords(clinic)}</p>
      </div>
      <div className="pl">
        <div>{listOf(clinic.areas)}</div>
        <div className="soft">{listOf(clinic.coaches)}</div>
        <div className="mt-1">
          <PlaceTicks taken={clinic.taken} capacity={clinic.capacity} />{' '}
          <b className={isFull ? 'soft ml-1' : 'ml-1'}>{placesLeft(clinic)}</b>
        </div>
      </div>
      <div className="pr">{priceOf(clinic, format)}</div>
    </li>
  )
}

function priceOf(clinic: PageClinic, format: Format) {
  if (clinic.payMode === 'free') {
    return (
      <>
        Free<small>{countOf(clinic)}</small>
      </>
    )
  }
  if (clinic.runPriceMinor !== null && clinic.saleMode !== 'drop-in') {
    return (
      <>
        {format.shortMoney(clinic.runPriceMinor)}
        <small>{countOf(clinic)}</small>
      </>
    )
  }
  return (
    <>
      {format.shortMoney(clinic.dropInPriceMinor ?? 0)}
      <small>a session</small>
    </>
  )
}

/** "10 sessions", or "last 4 sessions" of a run that is under way. */
function countOf({ sessionsAhead, sessionsTotal }: PageClinic): string {
  const many = `${sessionsAhead} session${sessionsAhead === 1 ? '' : 's'}`
  return sessionsAhead === sessionsTotal ? many : `last ${many}`
}
