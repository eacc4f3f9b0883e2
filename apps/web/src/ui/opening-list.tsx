import type { ReactNode } from 'react'
import { Drawing } from './drawing'

export type StepState = 'done' | 'now' | 'next'

/** A short list of things to set up, one after the other; the one that is on lies on paper. */
export function OpeningList({ children }: { children: ReactNode }) {
  return <ol className="opn">{children}</ol>
}

export function OpeningStep(props: {
  number: number
  label: string
  state: StepState
  children: ReactNode
}) {
  const { number, label, state } = props
  return (
    <li className={state} aria-current={state === 'now' ? 'step' : undefined}>
      <span className="n">{state === 'done' ? <Drawing of="tick" label="Done" /> : number}</span>
      <div>
        <h2 className="lab2">{label}</h2>
        {props.children}
      </div>
    </li>
  )
}
