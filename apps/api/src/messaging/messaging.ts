import { makeLink } from '../accounts/accounts'
import { readAcademy } from '../academies/academies'
import { makeInvitationLink } from '../academies/staff'
import { findSession, viewSessions } from '../clinics/clinics'
import type { Services } from '../platform/services'
import { inAcademy } from '../platform/tenancy/transaction'
import { writeCalendar, type CalendarEntry } from './calendar'
import { readEnrolmentFacts, type EnrolmentFacts } from './facts'
import { letterAsHtml, letterAsText, type Letter } from './letter'
import { invitationLetter, resetLetter, verificationLetter } from './mail/account-link'
import {
  calledOffLetter,
  changedLetter,
  confirmedLetter,
  givenUpLetter,
  offeredLetter,
} from './mail/places'
import type { MailProvider, OutgoingMail } from './provider'
import {
  claimMail,
  isSilenced,
  listEnrolmentsOfSession,
  noteAccountMail,
  noteSent,
} from './queries'

/**
 * Writes the mails of the product. What is said of places goes out once, however often it is asked
 * for; links and invitations go out each time, since each carries a secret of its own.
 */
export interface Messenger {
  sendAccountLink(wanted: { accountId: string; purpose: 'verify' | 'reset' }): Promise<void>
  sendInvitation(wanted: { academyId: string; invitationId: string }): Promise<void>
  tellConfirmed(wanted: { academyId: string; enrolmentId: string }): Promise<void>
  tellOffered(wanted: { academyId: string; enrolmentId: string }): Promise<void>
  tellGivenUp(wanted: {
    academyId: string
    enrolmentId: string
    refundMinor: number
  }): Promise<void>
  tellCalledOff(wanted: { academyId: string; sessionId: string }): Promise<void>
  tellChanged(wanted: { academyId: string; sessionId: string }): Promise<void>
}

export function makeMessenger(services: Services, provider: MailProvider): Messenger {
  const { config } = services
  const page = (slug: string, rest: string) => `${config.publicUrl}/${slug}/my/${rest}`
  const post = async (to: string, fromName: string, letter: Letter, extra = {}) => {
    const mail: OutgoingMail = {
      to,
      fromName,
      subject: letter.subject,
      text: letterAsText(letter),
      html: letterAsHtml(letter),
      ...extra,
    }
    return (await isSilenced(services.db, to)) ? '' : provider.send(mail)
  }

  /** The mail about one enrolment, under a key that makes it go out once. */
  const tell = async (
    wanted: { academyId: string; enrolmentId: string; key: string; template: string },
    write: (facts: EnrolmentFacts) => Letter | null,
    method: 'REQUEST' | 'CANCEL' | 'none',
  ) => {
    const { academyId, enrolmentId, key: businessKey, template } = wanted
    const ready = await inAcademy(services.db, academyId, async (trx) => {
      const facts = await readEnrolmentFacts(trx, enrolmentId)
      const letter = facts && write(facts)
      if (!facts || !letter) return null
      const now = services.clock.now()
      const claim = { businessKey, recipient: facts.addressee.email, template, createdAt: now }
      return (await claimMail(trx, claim)) ? { facts, letter } : null
    })
    if (!ready) return
    const { facts, letter } = ready
    const entry = method === 'none' ? null : calendarOf(services, facts, method)
    // Mail programs go by the method of the part, which must be the one that is written inside it.
    const calendar = entry ? { calendar: { method: entry.method, text: writeCalendar(entry) } } : {}
    const { name } = facts.academy
    const providerMessageId = await post(facts.addressee.email, name, letter, calendar)
    await inAcademy(services.db, academyId, (trx) =>
      noteSent(trx, { businessKey, providerMessageId, sentAt: services.clock.now() }),
    )
  }

  const tellOfSession = async (
    { academyId, sessionId }: { academyId: string; sessionId: string },
    what: 'called-off' | 'changed',
  ) => {
    const found = await inAcademy(services.db, academyId, async (trx) => {
      const enrolments = await listEnrolmentsOfSession(trx, sessionId)
      const session = await findSession(trx, sessionId)
      const [view] = session ? await viewSessions(trx, [session]) : []
      return session && view ? { session, view, enrolments } : null
    })
    if (!found) return
    const { session, view, enrolments } = found
    const areas = view.areas.map(({ name }) => name)
    const coaches = view.coaches.map(({ name }) => name)
    for (const { enrolmentId, owedMinor } of enrolments) {
      const key = `session.${what}:${sessionId}:${session.calendarSequence}:${enrolmentId}`
      await tell(
        { academyId, enrolmentId, key, template: what },
        (facts) => {
          const url = page(facts.academy.slug, `places/${enrolmentId}`)
          if (what === 'changed') {
            return changedLetter(facts, { session, areas, coaches, url })
          }
          const reason = session.calledOffReason ?? 'called off'
          return calledOffLetter(facts, { session, reason, owedMinor, url })
        },
        'REQUEST',
      )
    }
  }

  return {
    async sendAccountLink({ accountId, purpose }) {
      const link = await makeLink(services, { accountId, purpose })
      if (!link) return
      const { account, secret } = link
      const path = purpose === 'verify' ? 'verify' : 'reset'
      const given = { name: account.name, url: `${config.publicUrl}/${path}#${secret}` }
      const letter = purpose === 'verify' ? verificationLetter(given) : resetLetter(given)
      const providerMessageId = await post(account.email, 'Marram', letter)
      const now = services.clock.now()
      await noteAccountMail(services.db, {
        businessKey: `account.${purpose}:${accountId}:${now.toISOString()}`,
        accountId,
        recipient: account.email,
        template: purpose,
        providerMessageId,
        createdAt: now,
        sentAt: now,
      })
    },
    async sendInvitation({ academyId, invitationId }) {
      const link = await makeInvitationLink(services, { academyId, invitationId })
      if (!link) return
      const { invitation, academyName, secret } = link
      const { accent } = await inAcademy(services.db, academyId, (trx) => readAcademy(trx))
      const url = `${config.publicUrl}/invitation#${secret}`
      const letter = invitationLetter({ academyName, role: invitation.role, url, accent })
      await post(invitation.email, academyName, letter)
    },
    tellConfirmed: (wanted) =>
      tell(
        { ...wanted, key: `enrolment.confirmed:${wanted.enrolmentId}`, template: 'confirmed' },
        (facts) =>
          confirmedLetter(facts, {
            url: page(facts.academy.slug, `places/${wanted.enrolmentId}`),
          }),
        'REQUEST',
      ),
    tellOffered: (wanted) =>
      tell(
        { ...wanted, key: `enrolment.offered:${wanted.enrolmentId}`, template: 'offered' },
        (facts) =>
          facts.enrolment.state === 'held'
            ? offeredLetter(facts, {
                url: page(facts.academy.slug, `places/${wanted.enrolmentId}`),
              })
            : null,
        'none',
      ),
    tellGivenUp: ({ refundMinor, ...wanted }) =>
      tell(
        { ...wanted, key: `enrolment.given-up:${wanted.enrolmentId}`, template: 'given-up' },
        (facts) => givenUpLetter(facts, { refundMinor, url: page(facts.academy.slug, 'places') }),
        'CANCEL',
      ),
    tellCalledOff: (wanted) => tellOfSession(wanted, 'called-off'),
    tellChanged: (wanted) => tellOfSession(wanted, 'changed'),
  }
}

function calendarOf(
  services: Services,
  facts: EnrolmentFacts,
  method: 'REQUEST' | 'CANCEL',
): CalendarEntry {
  const { academy, clinic, venue, enrolment, places, addressee, changes } = facts
  const { publicUrl, mail } = services.config
  const isOver = enrolment.state === 'cancelled'
  return {
    uid: `${enrolment.id}@${new URL(publicUrl).hostname}`,
    sequence: changes + (isOver ? 1 : 0),
    method: isOver ? 'CANCEL' : method,
    title: `${clinic.title}, ${academy.name}`,
    description: clinic.bring ? `Bring: ${clinic.bring}` : clinic.summary,
    location: [venue.name, venue.address.replaceAll('\n', ', ')].filter(Boolean).join(', '),
    url: `${publicUrl}/${academy.slug}/my/places/${enrolment.id}`,
    zone: clinic.zone,
    organizer: { name: academy.name, email: mail.from },
    attendee: { name: addressee.name, email: addressee.email },
    stamp: services.clock.now(),
    sessions: places.map(({ number, startsAt, endsAt, state }) => ({
      number,
      startsAt,
      endsAt,
      isOn: state === 'confirmed',
    })),
    run:
      enrolment.kind === 'run'
        ? {
            rrule: clinic.rrule,
            startsOnLocal: clinic.startsOnLocal,
            startsAtLocal: clinic.startsAtLocal.slice(0, 5),
            durationMinutes: clinic.durationMinutes,
            skipDates: clinic.skipDates,
          }
        : null,
  }
}
