import type { Person } from './person'
import type { World } from './world'

/**
 * Signs in with the identity provider as a browser does: there, picks a person on the provider's
 * page, and comes back. Resolves to the address that the product then sends the browser to.
 */
export async function signInWithGoogle(
  world: World,
  person: Person,
  { subject }: { subject: string },
): Promise<string> {
  const away = await person.send('GET', '/auth/google?to=/back')
  const asked = new URL(away.location).searchParams
  const picked = await fetch(`${world.oauth.url}/authorize`, {
    method: 'POST',
    redirect: 'manual',
    body: new URLSearchParams([
      ['sub', subject],
      ...['redirect_uri', 'state', 'scope'].map((name) => [name, asked.get(name) ?? '']),
    ]),
  })
  const back = new URL(picked.headers.get('location') ?? '')
  const reply = await person.send('GET', `${back.pathname}${back.search}`)
  // The page that follows asks who is signed in, and gets the token that belongs to it.
  await person.must('session.read')
  return reply.location
}
