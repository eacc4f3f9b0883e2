/** Over so many places a figure is read faster than ticks. */
export const MOST_TICKS = 12

/** One pencil tally for each place; over twelve the figure is written. */
export function PlaceTicks({ taken, capacity }: { taken: number; capacity: number }) {
  const spoken = `${taken} of ${capacity} places taken`
  if (capacity > MOST_TICKS) {
    return (
      <span className="num" role="img" aria-label={spoken}>
        {taken}/{capacity}
      </span>
    )
  }
  return (
    <span className="ticks" role="img" aria-label={spoken}>
      {Array.from({ length: capacity }, (_, index) => (
        <i key={index} className={index < taken ? 't' : undefined} />
      ))}
    </span>
  )
}

/** "1 place left", "Full · 2 waiting". */
export function placesLeft(given: { taken: number; capacity: number; waiting: number }): string {
  const left = given.capacity - given.taken
  if (left > 0) return `${left} place${left === 1 ? '' : 's'} left`
  return given.waiting > 0 ? `Full · ${given.waiting} waiting` : 'Full'
}
