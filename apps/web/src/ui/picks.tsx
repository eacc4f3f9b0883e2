import { useId, type ReactNode } from 'react'

export interface Pick {
  value: string
  title: ReactNode
  detail?: ReactNode
  amount?: string
  /** Why it cannot be chosen; it is shown all the same. */
  refusal?: ReactNode
}

/** One choice of a few, each with its line of fact. */
export function Picks(props: {
  legend: string
  picks: readonly Pick[]
  value: string
  onChange: (value: string) => void
  children?: ReactNode
}) {
  const name = useId()
  return (
    <fieldset className="pk">
      <legend className="lab">{props.legend}</legend>
      {props.picks.map((pick) => (
        <label key={pick.value} className={pick.refusal ? 'no' : undefined}>
          <input
            type="radio"
            name={name}
            value={pick.value}
            checked={props.value === pick.value}
            disabled={Boolean(pick.refusal)}
            onChange={() => props.onChange(pick.value)}
          />
          <span>
            {pick.title}
            {(pick.refusal ?? pick.detail) && <small>{pick.refusal ?? pick.detail}</small>}
          </span>
          {pick.amount && <b className="num">{pick.amount}</b>}
        </label>
      ))}
      {props.children}
    </fieldset>
  )
}
