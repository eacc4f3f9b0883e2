import { Router, json } from 'express'
import type { DeliveryControls } from './deliveries'

/** What a control is told, as JSON. */
export type ControlBody = Record<string, unknown>

/** Gives a control its name, and says what it does. */
export type Act = (name: string, action: (body: ControlBody) => unknown) => void

/** A control that was told something it does not understand. */
export class ControlError extends Error {
  readonly status = 400
}

/**
 * A stand-in's controls over HTTP, for tests and loaders in other processes: POST to a name, with
 * JSON, is answered with `{ outcome }`, or with `{ error }`.
 */
export function makeControls(onChange: () => void): { router: Router; act: Act } {
  const router = Router()
  router.use(json())
  const act: Act = (name, action) =>
    void router.post(`/${name}`, (request, response) => {
      try {
        const outcome = action(Object(request.body) as ControlBody)
        onChange()
        response.json({ outcome: outcome ?? null })
      } catch (error) {
        const hasStatus = error instanceof Error && 'status' in error
        response.status(hasStatus ? Number(error.status) : 500).json({ error: String(error) })
      }
    })
  return { router, act }
}

export function deliveryControls(act: Act, deliveries: DeliveryControls): void {
  act('mute-webhooks', () => deliveries.mute(true))
  act('unmute-webhooks', () => deliveries.mute(false))
  act('hold-webhooks', () => deliveries.hold())
  act('release-webhooks', () => deliveries.release())
  act('release-webhooks-reversed', () => deliveries.releaseReversed())
  act('duplicate-next', (body) => deliveries.duplicateNext(numberOf(body, 'count', 1)))
  act('drop-next', (body) => deliveries.dropNext(numberOf(body, 'count', 1)))
}

export function failureOf(body: ControlBody): { status: number; count: number } {
  return { status: numberOf(body, 'status', 500), count: numberOf(body, 'count', 1) }
}

/** @throws ControlError where a text is missing that has no other value. */
export function textOf(body: ControlBody, name: string, otherwise?: string): string {
  const value = body[name] ?? otherwise
  if (typeof value !== 'string') throw new ControlError(`${name} is missing.`)
  return value
}

/** @throws ControlError for what is no number. */
export function numberOf(body: ControlBody, name: string, otherwise: number): number {
  const value = Number(body[name] ?? otherwise)
  if (Number.isFinite(value)) return value
  throw new ControlError(`${name} is no number.`)
}

/** One of the words that a control knows; left out, the first. @throws ControlError for others. */
export function oneOf<Word extends string>(
  body: ControlBody,
  name: string,
  words: readonly [Word, ...Word[]],
): Word {
  const given = textOf(body, name, words[0])
  const known = words.find((word) => word === given)
  if (known === undefined) throw new ControlError(`${name} is one of ${words.join(', ')}.`)
  return known
}
