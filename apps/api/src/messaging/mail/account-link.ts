import { LINK_HOURS } from '../../accounts/accounts'
import { INVITATION_DAYS } from '../../academies/staff'
import type { Letter } from '../letter'
import { spanInWords } from '../span-in-words'

const FOOTER = 'Marram. If you did not ask for this, do nothing: without the link nothing changes.'
const ACCENT = '#26563d'

export function verificationLetter(given: { name: string; url: string }): Letter {
  return {
    subject: 'Please confirm your e-mail address',
    heading: 'Marram',
    greeting: `Hello ${given.name},`,
    paragraphs: [
      'Press the button to confirm that this address is yours. ' +
        `It works for ${spanInWords({ hours: LINK_HOURS.verify })}.`,
    ],
    action: { label: 'Confirm my address', url: given.url },
    footer: FOOTER,
    accent: ACCENT,
  }
}

export function resetLetter(given: { name: string; url: string }): Letter {
  return {
    subject: 'Choose a new password',
    heading: 'Marram',
    greeting: `Hello ${given.name},`,
    paragraphs: [
      'Press the button to choose a new password. ' +
        `It works for ${spanInWords({ hours: LINK_HOURS.reset })}, once, and signs you out ` +
        'everywhere else.',
    ],
    action: { label: 'Choose a new password', url: given.url },
    footer: FOOTER,
    accent: ACCENT,
  }
}

export function invitationLetter(given: {
  academyName: string
  role: string
  url: string
  accent: string
}): Letter {
  return {
    subject: `${given.academyName} invites you`,
    heading: given.academyName,
    greeting: 'Hello,',
    paragraphs: [
      `You are invited to join ${given.academyName} as ${roleInWords(given.role)}.`,
      'Press the button and sign in, or make an account with this address. ' +
        `It works for ${spanInWords({ hours: INVITATION_DAYS * 24 })}.`,
    ],
    action: { label: 'Take up the invitation', url: given.url },
    footer: 'If you do not know this academy, do nothing.',
    accent: given.accent,
  }
}

function roleInWords(role: string): string {
  return { owner: 'an owner', desk: 'front desk', bookkeeper: 'a bookkeeper' }[role] ?? 'a coach'
}
