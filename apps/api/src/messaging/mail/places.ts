import { formatTime, formatDay } from '@marram/schedule/format'
import { moneyText, timeText, type EnrolmentFacts } from '../facts'
import { CHOICE_DAYS } from '../../checkout/called-off'
import type { Letter } from '../letter'
import { spanInWords } from '../span-in-words'

type Draft = Pick<Letter, 'subject' | 'paragraphs' | 'facts' | 'action'>

function letter(facts: EnrolmentFacts, draft: Draft): Letter {
  const { academy, addressee } = facts
  const address = academy.address ? `, ${academy.address.replaceAll('\n', ', ')}` : ''
  return {
    heading: academy.name,
    greeting: `Hello ${addressee.name},`,
    footer: `${academy.name}${address}. Times are the venue’s own.`,
    accent: academy.accent,
    ...draft,
  }
}

const ahead = ({ places }: EnrolmentFacts) => places.filter(({ state }) => state === 'confirmed')

function whenText(facts: EnrolmentFacts): string {
  const places = ahead(facts)
  const [first] = places
  const last = places.at(-1)
  if (!first || !last) return ''
  if (places.length === 1) return timeText(facts, first)
  const { zone } = facts.clinic
  const { locale } = facts.academy
  const until = formatDay({ at: last.startsAt, zone, locale })
  return `${places.length} sessions, the first ${timeText(facts, first)}, the last ${until}`
}

const forWhom = ({ enrolment }: EnrolmentFacts): string => enrolment.golferName

export function confirmedLetter(facts: EnrolmentFacts, given: { url: string }): Letter {
  const { clinic, venue, academy, enrolment } = facts
  const paid = enrolment.netMinor + enrolment.taxMinor
  const tax = enrolment.taxMinor
    ? `, with ${moneyText(academy, enrolment.taxMinor)} ${academy.taxName} in it`
    : ''
  return letter(facts, {
    subject: `${clinic.title}: the place is yours`,
    paragraphs: [`${forWhom(facts)} has a place in ${clinic.title}. The dates are attached.`],
    facts: [
      ['When', whenText(facts)],
      ['Where', [venue.name, venue.address].filter(Boolean).join(', ')],
      ...(clinic.bring ? ([['Bring', clinic.bring]] as [string, string][]) : []),
      ['Price', paid === 0 ? 'Free' : `${moneyText(academy, paid)}${tax}`],
    ],
    action: { label: 'See the place', url: given.url },
  })
}

export function offeredLetter(facts: EnrolmentFacts, given: { url: string }): Letter {
  const { clinic, academy, enrolment } = facts
  const until = enrolment.heldUntil ?? enrolment.createdAt
  const place = { zone: clinic.zone, locale: academy.locale }
  return letter(facts, {
    subject: `${clinic.title}: a place is free for you`,
    paragraphs: [
      `A place has come free for ${forWhom(facts)}. It is kept until ` +
        `${formatTime({ at: until, ...place })} on ${formatDay({ at: until, ...place })}; ` +
        'then it goes to the next person.',
    ],
    action: { label: 'Take the place', url: given.url },
  })
}

export function givenUpLetter(
  facts: EnrolmentFacts,
  given: { refundMinor: number; url: string },
): Letter {
  const { clinic, academy } = facts
  const money =
    given.refundMinor > 0
      ? `${moneyText(academy, given.refundMinor)} goes back to where it came from.`
      : 'Nothing goes back, by the policy that was shown.'
  return letter(facts, {
    subject: `${clinic.title}: the place was given up`,
    paragraphs: [`${forWhom(facts)} no longer has a place in ${clinic.title}. ${money}`],
    action: { label: 'See all your places', url: given.url },
  })
}

export function calledOffLetter(
  facts: EnrolmentFacts,
  given: {
    session: { startsAt: Date; endsAt: Date }
    reason: string
    owedMinor: number
    url: string
  },
): Letter {
  const { clinic, academy } = facts
  const owed =
    given.owedMinor > 0
      ? [
          `${moneyText(academy, given.owedMinor)} is yours: back as money, or kept as credit. ` +
            `You have ${spanInWords({ hours: CHOICE_DAYS * 24 })} to choose; ` +
            `then it is ${defaultInWords(academy.owedDefault)}.`,
        ]
      : []
  return letter(facts, {
    subject: `${clinic.title} on ${formatDay({ at: given.session.startsAt, zone: clinic.zone, locale: academy.locale })} is called off`,
    paragraphs: [
      `${clinic.title}, ${timeText(facts, given.session)}, will not be held: ${given.reason}.`,
      ...owed,
    ],
    action: { label: owed.length > 0 ? 'Choose' : 'See the place', url: given.url },
  })
}

const defaultInWords = (choice: 'credit' | 'money') =>
  choice === 'credit' ? 'kept as credit' : 'given back as money'

export function changedLetter(
  facts: EnrolmentFacts,
  given: {
    session: { startsAt: Date; endsAt: Date }
    areas: readonly string[]
    coaches: readonly string[]
    url: string
  },
): Letter {
  const { clinic, venue } = facts
  return letter(facts, {
    subject: `${clinic.title}: one session has changed`,
    paragraphs: ['One session is not as it was. This is how it stands now:'],
    facts: [
      ['When', timeText(facts, given.session)],
      ['Where', [given.areas.join(' and '), venue.name].filter(Boolean).join(', ')],
      ['With', given.coaches.join(' and ')],
    ],
    action: { label: 'See the place', url: given.url },
  })
}
