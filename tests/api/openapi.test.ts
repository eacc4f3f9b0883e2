import { ROUTES } from '@marram/contract'
import { expect, it } from 'vitest'
import { useWorld } from '../support/use-world'

const world = await useWorld()

it('serves its description to anybody, for the address it is served at', async () => {
  const response = await fetch(`${world.url}/api/openapi.json`)
  expect(response.headers.get('content-type')).toContain('application/json')
  const document = (await response.json()) as {
    openapi: string
    servers: { url: string }[]
    paths: Record<string, object>
  }
  expect(document).toMatchObject({ openapi: '3.1.0', servers: [{ url: world.url }] })
  const operations = Object.values(document.paths).flatMap((item) => Object.keys(item))
  expect(operations).toHaveLength(Object.keys(ROUTES).length)
})
