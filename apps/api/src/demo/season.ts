/** What happens in the demo's season, in order of time; the clock is moved to each thing. */
export interface Happening {
  at: Date
  /** Things of one moment happen in this order. */
  order: number
  what: () => Promise<void>
}

export class Season {
  readonly #happenings: Happening[] = []

  plan(at: Date, what: () => Promise<void>, order = 0): void {
    this.#happenings.push({ at, order, what })
  }

  /** Plays everything up to `until`. `after` runs when a day's happenings are over. */
  async play(given: {
    until: Date
    moveTo: (at: Date) => void
    after: () => Promise<void>
  }): Promise<void> {
    let day = ''
    for (;;) {
      // Things may plan further things, so what is next is looked for each time.
      const next = this.#takeNext(given.until)
      if (!next) break
      const itsDay = next.at.toISOString().slice(0, 10)
      if (itsDay !== day) await given.after()
      day = itsDay
      given.moveTo(next.at)
      await next.what()
    }
    await given.after()
  }

  #takeNext(until: Date): Happening | undefined {
    this.#happenings.sort((a, b) => +a.at - +b.at || a.order - b.order)
    const [first] = this.#happenings
    if (!first || first.at > until) return undefined
    return this.#happenings.shift()
  }
}
