import { readFileSync } from 'node:fs'
import { dirname, join } from 'node:path'
import { fileURLToPath } from 'node:url'
import { expect, it } from 'vitest'

const folder = dirname(fileURLToPath(import.meta.url))

/** Every module that a file loads when it runs; imports of types alone load nothing. */
function loadedBy(file: string, seen = new Set<string>()): Set<string> {
  const text = readFileSync(join(folder, file), 'utf8')
  const statements = text.matchAll(/^(?:import|export) (?!type )[^;]*? from '([^']+)'/gms)
  for (const [, from = ''] of statements) {
    if (seen.has(from)) continue
    seen.add(from)
    if (from.startsWith('./')) loadedBy(`${from.slice(2)}.ts`, seen)
  }
  return seen
}

it('keeps the schemas out of what the public pages load', () => {
  const loaded = loadedBy('routes.ts')
  expect(loaded).toContain('./permissions')
  expect(loaded).not.toContain('zod')
  expect(loadedBy('schemas.ts')).toContain('zod')
})
