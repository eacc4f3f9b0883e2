import { readFileSync } from 'node:fs'
import { join, resolve } from 'node:path'
import express, { Router, type Request, type RequestHandler } from 'express'
import type { Services } from '../services'
import { fillPage, type PageHead } from './page-html'

/** Gives the head of a page by its path; null for one that is not there. */
export type DescribePage = (request: Request) => Promise<PageHead | null>

const YEAR_SECONDS = 365 * 24 * 60 * 60

/** Serves the built web app: its files for ever, since their names carry a hash, and its pages. */
export function webApp(services: Services, describe: DescribePage): Router {
  const folder = resolve(services.config.webFolder)
  const template = readFileSync(join(folder, 'index.html'), 'utf8')
  const router = Router()
  router.use(
    '/assets',
    express.static(join(folder, 'assets'), {
      index: false,
      immutable: true,
      maxAge: YEAR_SECONDS * 1000,
      fallthrough: false,
    }),
  )
  router.use(express.static(folder, { index: false, maxAge: 60 * 60 * 1000 }))
  const page: RequestHandler = async (request, response, next) => {
    if (request.method !== 'GET' && request.method !== 'HEAD') return next()
    response.locals['route'] = 'page'
    const head = await describe(request)
    const nonce = String(response.locals['nonce'])
    response
      .status(head ? 200 : 404)
      .set('Cache-Control', 'no-store')
      .type('html')
      .send(fillPage(template, { head: head ?? NOT_THERE, nonce }))
  }
  router.use(page)
  return router
}

const NOT_THERE: PageHead = {
  title: 'Not found – Marram',
  description: 'There is no such page.',
  isIndexed: false,
}
