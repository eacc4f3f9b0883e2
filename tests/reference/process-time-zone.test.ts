import { execFileSync } from 'node:child_process'
import { fileURLToPath } from 'node:url'
import { describe, expect, it } from 'vitest'

const SCRIPT = fileURLToPath(new URL('./schedule-in-child.ts', import.meta.url))

/** What the schedule says in a process whose own zone is another. */
function askIn(processZone: string): { offsetMinutes: number; said: unknown[] } {
  const stdout = execFileSync(process.execPath, ['--import', 'tsx', SCRIPT], {
    env: { ...process.env, TZ: processZone },
    encoding: 'utf8',
    maxBuffer: 64 * 1024 * 1024,
  })
  // The script prints this shape; the comparison fails on any other.
  return JSON.parse(stdout) as { offsetMinutes: number; said: unknown[] }
}

describe('the zone of the process', () => {
  it('changes no date, no instant and no text', { timeout: 60_000 }, () => {
    const answers = ['UTC', 'America/Denver', 'Australia/Sydney'].map(askIn)
    // The processes did run in three zones, and had something to say.
    expect(answers.map(({ offsetMinutes }) => offsetMinutes)).toEqual([0, 360, -600])
    const [inUtc, inDenver, inSydney] = answers.map(({ said }) => said)
    expect(inUtc?.length).toBe(4 * 7 * 5)
    expect(inDenver).toEqual(inUtc)
    expect(inSydney).toEqual(inUtc)
  })
})
