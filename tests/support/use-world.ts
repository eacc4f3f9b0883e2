import { afterAll, afterEach } from 'vitest'
import { takeDatabase } from './database'
import { makeWorld, type World, type WorldOptions } from './world'

/**
 * The world of a test file, made while the file is read. Each test fails on an error line that it
 * did not take; the world ends with the file.
 */
export async function useWorld(options: Omit<WorldOptions, 'database'> = {}): Promise<World> {
  const world = await makeWorld({ database: await takeDatabase(), ...options })
  afterEach(() => {
    const texts = world.takeErrors().map((line) => JSON.stringify(line))
    if (texts.length > 0) throw new Error(`Nobody expected these error lines:\n${texts.join('\n')}`)
  })
  afterAll(() => world.close())
  return world
}
