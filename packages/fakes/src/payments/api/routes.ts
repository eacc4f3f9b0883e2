import { Router, text, type Request, type Response } from 'express'
import type { Machine } from '../machine/machine'
import { expandPaths } from '../objects/expand'
import { showById, type View } from '../objects/objects'
import { ProviderError } from '../provider-error'
import { checkAccount, checkKey, checkKnown, readAsked, type Asked } from './asked'
import { textAt } from './form-body'
import { makeIdempotency } from './idempotency'
import { PAGE_PARAMS, listPage, type Listed } from './lists'
import type { Trouble } from './trouble'

export type Answer = (asked: Asked) => object

/** How a part of the API says what it answers. */
export interface Routes {
  get: (path: string, answer: Answer) => void
  /** A change; parameters that are not named here are refused. */
  post: (path: string, known: readonly string[], answer: Answer) => void
  /** A list in pages, with what it can be narrowed by. */
  list: <T extends Listed>(
    path: string,
    records: (asked: Asked) => readonly T[],
    filters?: Readonly<Record<string, (record: T, wanted: string) => boolean>>,
  ) => void
}

export interface ApiOptions {
  secretKey: string
  view: View
  trouble: Trouble
  onChange: () => void
}

/** A router that speaks the provider's API, and the means to say what it answers. */
export function makeRoutes(
  machine: Machine,
  { secretKey, view, trouble, onChange }: ApiOptions,
): { router: Router; routes: Routes } {
  const router = Router()
  const once = makeIdempotency(machine)
  const show = (id: string) => showById(id, view)
  router.use('/v1', text({ type: () => true, limit: '1mb' }))

  const write = (answer: Answer, asked: Asked): string => {
    machine.tick()
    const shown = answer(asked)
    expandPaths(shown, { paths: asked.expand, show })
    return JSON.stringify(shown)
  }
  const handle =
    (respond: (request: Request, response: Response, asked: Asked) => Promise<void>) =>
    async (request: Request, response: Response): Promise<void> => {
      response.set('request-id', `req_fake${(machine.state.next += 1).toString(36)}`)
      try {
        checkKey(request, secretKey)
        const asked = readAsked(request)
        checkAccount(machine.state, asked.account)
        await respond(request, response, asked)
      } catch (error) {
        sendError(response, error)
      }
    }
  const get = (path: string, known: readonly string[], answer: Answer) =>
    router.get(
      path,
      handle(async (_request, response, asked) => {
        checkKnown(asked.query, known)
        response.type('json').send(write(answer, asked))
      }),
    )
  const post = (path: string, known: readonly string[], answer: Answer) =>
    router.post(
      path,
      handle(async (request, response, asked) => {
        const written = await once(request, async () => {
          await trouble.passRequest()
          checkKnown(asked.form, known)
          return write(answer, asked)
        })
        onChange()
        if (trouble.losesAnswer()) return void request.socket.destroy()
        if (written.isReplayed) response.set('idempotent-replayed', 'true')
        response.status(written.status).type('json').send(written.body)
      }),
    )
  const routes: Routes = {
    get: (path, answer) => void get(path, [], answer),
    post,
    list: (path, records, filters = {}) =>
      void get(path, [...PAGE_PARAMS, ...Object.keys(filters)], (asked) => {
        const wanted = Object.entries(filters).flatMap(([name, isWanted]) => {
          const value = textAt(asked.query, name)
          return value === undefined ? [] : [{ isWanted, value }]
        })
        const found = records(asked).filter((record) =>
          wanted.every(({ isWanted, value }) => isWanted(record, value)),
        )
        return listPage(asked, { url: path, records: found, show: ({ id }) => show(id) ?? {} })
      }),
  }
  return { router, routes }
}

export function sendError(response: Response, error: unknown): void {
  const known =
    error instanceof ProviderError
      ? error
      : new ProviderError(500, String(error), { type: 'api_error' })
  const { status, type, code, param, message } = known
  response.status(status).json({
    error: { type, message, ...(code ? { code } : {}), ...(param ? { param } : {}) },
  })
}
