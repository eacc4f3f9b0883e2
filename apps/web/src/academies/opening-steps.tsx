import type { ReactNode } from 'react'
import { useState } from 'react'
import { Link, useNavigate } from 'react-router'
import { sentenceOf } from '../api/problem'
import { paths } from '../paths'
import { Button, buttonClass } from '../ui/button'
import { Notice } from '../ui/notice'
import { OpeningList, OpeningStep, type StepState } from '../ui/opening-list'
import { toast } from '../ui/toast'
import { usePublishAcademy, type Academy } from './queries'

/** The steps after the first, and what each is about before its turn comes. */
export const LATER_STEPS = [
  { label: 'Where you teach', about: 'A venue, one area of it, and who teaches there.' },
  {
    label: 'Your first clinic',
    about: 'When, where and for how many, with every date and its light.',
  },
  {
    label: 'How you are paid',
    about:
      'You connect the payment provider on its own page. Until then golfers can pay at the desk. About a minute.',
  },
  { label: 'Your page', about: 'You read it once as a golfer sees it, and put it live.' },
] as const

/** A step that the opening's page composes from another feature. */
export interface Step {
  isDone: boolean
  /** What stands there while the step is on; it may be left for later where it can wait. */
  now: (onLater: () => void) => ReactNode
  done: ReactNode
}

/** The opening after its first sentence: one step on, those before it done, those after it waiting. */
export function OpeningSteps(props: {
  academy: Academy
  venue: Step
  clinic: Step
  payment: Step
}) {
  const { academy } = props
  const [later, setLater] = useState<readonly number[]>([])
  const steps = [props.venue, props.clinic, props.payment]
  const waits = steps.findIndex(({ isDone }, index) => !isDone && !later.includes(index))
  const isLive = academy.publishedAt !== null
  return (
    <OpeningList>
      <OpeningStep number={1} label="Who you are" state="done">
        <p className="say sm">
          We are {academy.name} in {academy.place}. Our page is {location.host}/{academy.slug}.
        </p>
      </OpeningStep>
      {steps.map((step, index) => {
        const state = stateOf(index, waits)
        // Each of the three has its words in the list of later steps.
        const { label = '', about = '' } = LATER_STEPS[index] ?? {}
        return (
          <OpeningStep key={label} number={index + 2} label={label} state={state}>
            {state === 'now' && step.now(() => setLater((had) => [...had, index]))}
            {state === 'done' &&
              (step.isDone ? step.done : <p className="say sm">Left for later.</p>)}
            {state === 'next' && <p className="soft">{about}</p>}
          </OpeningStep>
        )
      })}
      <LastStep academy={academy} isTurn={waits === -1 && !isLive} />
    </OpeningList>
  )
}

function stateOf(index: number, waits: number): StepState {
  if (index === waits) return 'now'
  return waits === -1 || index < waits ? 'done' : 'next'
}

/** The page is read once, and put live. */
function LastStep({ academy, isTurn }: { academy: Academy; isTurn: boolean }) {
  const { slug, publishedAt } = academy
  const [, , , { label, about }] = LATER_STEPS
  const navigate = useNavigate()
  const publish = usePublishAcademy(slug)
  const putLive = () =>
    publish.mutate(
      { isPublished: true },
      {
        onSuccess: () => {
          toast('Your page is live.')
          void navigate(paths.week(slug))
        },
      },
    )
  const state = isTurn ? 'now' : publishedAt === null ? 'next' : 'done'
  return (
    <OpeningStep number={5} label={label} state={state}>
      {!isTurn && <p className="soft">{about}</p>}
      {isTurn && (
        <>
          <p className="mb-3">
            <Link to={paths.academy(slug)} target="_blank">
              Read it as a golfer sees it
            </Link>
            , in a page of its own. Then put it live.
          </p>
          {publish.error && <Notice kind="flag">{sentenceOf(publish.error)}</Notice>}
          <Button
            kind="go"
            isBig
            waiting={publish.isPending && 'Putting it live…'}
            onClick={putLive}
          >
            Put it live
          </Button>
        </>
      )}
      {publishedAt !== null && (
        <Link className={buttonClass()} to={paths.week(slug)}>
          Go to the week board
        </Link>
      )}
    </OpeningStep>
  )
}
