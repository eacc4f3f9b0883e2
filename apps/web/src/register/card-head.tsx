import { Link } from 'react-router'
import type { Format } from '../academies/format'
import { call } from '../api/client'
import { useAcademyMutation } from '../api/mutation'
import { sentenceOf } from '../api/problem'
import type { Clinic } from '../clinics/queries'
import { useMay } from '../layouts/staff.layout'
import { paths } from '../paths'
import { Button, buttonClass } from '../ui/button'
import { Initials } from '../ui/initials'
import { Notice } from '../ui/notice'
import { PageHead } from '../ui/page-head'
import { toast } from '../ui/toast'

/** What a clinic's card is of, and what can be done with the whole of it. */
export function CardHead(props: { academy: string; clinic: Clinic; format: Format }) {
  const { academy, clinic, format } = props
  const may = useMay()
  const params = { clinicId: clinic.id }
  const publish = useAcademyMutation(academy, (isPublished: boolean) =>
    call('clinics.publish', { academy, params, body: { isPublished } }),
  )
  const isLive = clinic.state === 'published'
  return (
    <>
      <PageHead
        crumb={<Link to={paths.clinics(academy)}>Clinics</Link>}
        title={clinic.title}
        sub={
          <>
            {whenInWords(clinic, format)}. {clinic.venueName}.{' '}
            {clinic.coaches.map((coach) => (
              <span key={coach.id} className="nowrap">
                <Initials of={coach.initials} /> {coach.name}{' '}
              </span>
            ))}
          </>
        }
        actions={
          may('clinics:write') && (
            <>
              <Link className={buttonClass()} to={paths.changeClinic(academy, clinic.id)}>
                Change clinic
              </Link>
              <Button
                kind={isLive ? 'plain' : 'go'}
                waiting={publish.isPending && 'One moment…'}
                onClick={() =>
                  publish.mutate(!isLive, {
                    onSuccess: () => toast(isLive ? 'Taken off the page.' : 'On the page now.'),
                  })
                }
              >
                {isLive ? 'Take off the page' : 'Put on the page'}
              </Button>
            </>
          )
        }
      />
      {publish.error && <Notice kind="flag">{sentenceOf(publish.error)}</Notice>}
    </>
  )
}

/** "Every Tuesday, 18:00–19:15, 15 September to 3 November". */
function whenInWords({ recurrence, sessions }: Clinic, format: Format): string {
  const [first] = sessions
  const last = sessions.at(-1)
  if (!first || !last) return recurrence
  const days = `${format.day(first.startsAt, 'long')} to ${format.day(last.startsAt, 'long')}`
  return `${recurrence}, ${format.range(first)}, ${days}`
}
