import { describe, expect, it } from 'vitest'
import { useWorld } from '../support/use-world'

const world = await useWorld()

describe('what a machine’s keeper asks', () => {
  it.each(['/healthz', '/readyz'])('%s answers', async (path) => {
    expect((await fetch(`${world.url}${path}`)).status).toBe(200)
  })

  it('counts for those on the machine itself', async () => {
    const reply = await fetch(`${world.url}/metrics`)
    expect(reply.status).toBe(200)
    expect(await reply.text()).toMatch(/^marram_/m)
  })

  it.each(['X-Forwarded-For', 'Forwarded'])(
    'counts for nobody behind a proxy: %s',
    async (name) => {
      const headers = { [name]: name === 'Forwarded' ? 'for=203.0.113.9' : '203.0.113.9' }
      expect((await fetch(`${world.url}/metrics`, { headers })).status).toBe(404)
    },
  )
})
