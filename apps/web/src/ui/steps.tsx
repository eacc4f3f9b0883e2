/** The three words of taking a place, with the one that is on. */
export function Steps({ steps, current }: { steps: readonly string[]; current: number }) {
  return (
    <ol className="steps">
      {steps.map((step, index) => (
        <li
          key={step}
          className={index < current ? 'done' : undefined}
          aria-current={index === current ? 'step' : undefined}
        >
          {step}
        </li>
      ))}
    </ol>
  )
}
