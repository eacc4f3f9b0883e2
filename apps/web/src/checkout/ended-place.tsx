import { Link } from 'react-router'
import type { Format } from '../academies/format'
import type { AcademyFace } from '../clinics/queries'
import type { Enrolment } from '../enrolments/queries'
import { paths } from '../paths'
import { buttonClass } from '../ui/button'
import { Notice } from '../ui/notice'
import { endedInWords } from './ended-words'
import { OwedPlaces } from './owed-places'

/** A place that has ended: why, what is owed for it, and what else there is. */
export function EndedPlace(props: { enrolment: Enrolment; academy: AcademyFace; format: Format }) {
  const { enrolment, academy, format } = props
  return (
    <>
      <h1>{enrolment.clinic.title}</h1>
      <div className="my-5">
        <Notice kind={enrolment.endedBecause === 'lapsed' ? 'flag' : 'haar'}>
          {endedInWords(enrolment)}
        </Notice>
      </div>
      <OwedPlaces enrolment={enrolment} academy={academy} format={format} />
      <p className="actions mb-10">
        <Link
          className={buttonClass({ kind: 'go' })}
          to={paths.clinic(academy.slug, enrolment.clinic.slug)}
        >
          See the clinic again
        </Link>
        <Link className={buttonClass()} to={paths.academy(academy.slug)}>
          What else has a place
        </Link>
      </p>
    </>
  )
}
