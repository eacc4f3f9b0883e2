import { expect, it } from 'vitest'
import { useWorld } from '../support/use-world'

const world = await useWorld()

it.each(['error=access_denied', 'error=server_error', 'error=%3Cscript%3E', 'code=junk'])(
  'leads back to the sign-in when the identity provider answers %s',
  async (query) => {
    const back = `${world.url}/auth/google/callback?${query}`
    const reply = await fetch(back, { redirect: 'manual' })
    expect(reply.status).toBe(302)
    expect(reply.headers.get('location')).toBe('/sign-in?google=refused&to=%2F')
  },
)
