import { escapeHtml, page } from '../page'
import type { FakePerson } from './people'

/** What the page hands on from the request to the choice. */
export interface AskedFor {
  redirectUri: string
  state: string
  scope: string
}

/** The page where a person says who they are, or that they would rather not. */
export function pickPage(people: readonly FakePerson[], asked: AskedFor): string {
  const { redirectUri, state, scope } = asked
  const hidden = Object.entries({ redirect_uri: redirectUri, state, scope })
    .map(([name, value]) => `<input type="hidden" name="${name}" value="${escapeHtml(value)}">`)
    .join('')
  const buttons = people.map(({ sub, name, email, isVerified }) => {
    const who = `${escapeHtml(name)}, ${escapeHtml(email)}${isVerified ? '' : ' (not confirmed)'}`
    return `<p><button name="sub" value="${sub}">${who}</button></p>`
  })
  return page(
    'Who are you?',
    `<h1>Who are you?</h1>
     <p class="note">The local stand-in of an identity provider. All people are invented.</p>
     <form method="post" action="/authorize">${hidden}${buttons.join('')}
     <p><button name="sub" value="nobody">Cancel</button></p></form>
     <form method="post" action="/authorize">${hidden}<label for="email">Somebody else</label>
     <input id="email" name="email" type="email" required><p><button>Sign in</button></p></form>`,
  )
}

/** The page for a request that no person can answer. */
export function refusalPage(sentence: string): string {
  return page('Sign in', `<h1>This cannot be signed in to</h1><p>${escapeHtml(sentence)}</p>`)
}
