import type { Format } from '../academies/format'
import type { AcademyFace } from '../clinics/queries'
import type { Enrolment } from '../enrolments/queries'
import { Facts } from '../ui/facts'
import { Mark } from '../ui/mark'
import { Notice } from '../ui/notice'
import { whenInWords } from './before-you-pay'
import { GiveUp } from './give-up'
import { OwedPlaces } from './owed-places'

/** Yours: the dates, what to bring, how it was paid, and how to give it up. */
export function ConfirmedPlace(props: {
  enrolment: Enrolment
  academy: AcademyFace
  format: Format
  isBack: boolean
}) {
  const { enrolment, academy, format, isBack } = props
  const { clinic, golfer } = enrolment
  return (
    <>
      <h1>{clinic.title}</h1>
      <div className="my-5">
        {enrolment.owedMinor > 0 ? (
          <Notice kind="ok">
            <b>The place is yours.</b> {format.money(enrolment.owedMinor)} is to be paid at the
            desk.
          </Notice>
        ) : (
          <Notice kind="ok">
            <b>{isBack ? 'Paid: the place is yours.' : 'The place is yours.'}</b> The dates for your
            calendar come by mail.
          </Notice>
        )}
      </div>
      <OwedPlaces enrolment={enrolment} academy={academy} format={format} />
      <div className="cols">
        <Facts
          facts={[
            ['Who', golfer.name],
            ['When', whenInWords(enrolment, format)],
            ['Where', clinic.venueName],
            ['Bring', clinic.bring],
            [
              'Price',
              enrolment.totalMinor === 0
                ? 'Free'
                : `${format.money(enrolment.totalMinor)}${
                    enrolment.taxMinor > 0
                      ? `, ${format.money(enrolment.taxMinor)} ${academy.taxName} in it`
                      : ''
                  }`,
            ],
          ]}
        />
        <div>
          <DatesCard enrolment={enrolment} format={format} />
          <GiveUp academy={academy.slug} enrolment={enrolment} format={format} />
        </div>
      </div>
    </>
  )
}

/** Every session of the place, with its mark once there is one. */
function DatesCard({ enrolment, format }: { enrolment: Enrolment; format: Format }) {
  return (
    <div className="card">
      <table className="sc">
        <thead>
          <tr>
            <th scope="col">Session</th>
            <th scope="col">When</th>
            <th scope="col" className="ctr">
              Mark
            </th>
          </tr>
        </thead>
        <tbody>
          {enrolment.places.map((place) => (
            <tr key={place.id}>
              <th scope="row">{place.number}</th>
              <td className={place.isCalledOff ? 'off' : undefined}>
                {format.day(place.startsAt)}, {format.time(place.startsAt)}
              </td>
              <td className="mk">
                {place.isCalledOff ? 'Called off' : <Mark mark={place.mark ?? 'not-yet'} />}
              </td>
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  )
}
