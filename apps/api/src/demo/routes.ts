import { notFound } from '../platform/errors'
import type { Handlers } from '../platform/http/context'
import type { Services } from '../platform/services'
import { DEMO_PASSWORD, DEMO_PEOPLE } from './people'

/** Who may be tried out at sign-in. There is nobody outside the demo. */
export function demoHandlers({ config }: Services): Handlers {
  return {
    'demo.people': async () => {
      if (config.mode !== 'demo') throw notFound('demo')
      const people = DEMO_PEOPLE.map((person) => ({ ...person }))
      return { password: DEMO_PASSWORD, mailboxUrl: config.mail.url ?? '', people }
    },
  }
}
