import { openApiDocument } from '@marram/contract/openapi'
import { Router } from 'express'
import type { Services } from '../services'

/** The API's own description, built once, when it is first asked for. */
export function openApiRoute({ config }: Pick<Services, 'config'>): Router {
  let text: string | undefined
  const router = Router()
  router.get('/api/openapi.json', (_request, response) => {
    response.locals['route'] = 'openapi'
    text ??= JSON.stringify(openApiDocument({ publicUrl: config.publicUrl }))
    response.set('Cache-Control', 'no-cache').type('json').send(text)
  })
  return router
}
