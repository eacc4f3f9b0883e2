import fc from 'fast-check'

type Json = null | boolean | number | string | Json[] | { [key: string]: Json }

/** Values that a form, a broken phone or somebody hostile might put where another was meant. */
const ABSURD: readonly Json[] = [
  null,
  true,
  '',
  '   ',
  0,
  -1,
  0.5,
  1e308,
  -9_007_199_254_740_993,
  [],
  {},
  [[]],
  'x'.repeat(5_000),
  'Orla\r\nBcc: everybody@mail.example',
  'nul \u0000 in it',
  'half a \ud800 character',
  '0001-01-01',
  '9999-12-31',
  '2031-02-30',
  '24:00',
  'FREQ=SECONDLY;COUNT=1000000',
  'FREQ=WEEKLY;COUNT=-2;INTERVAL=0',
  '00000000-0000-0000-0000-000000000000',
  "'; DROP TABLE places; --",
  '<script>alert(1)</script>',
  '__proto__',
]

type Change = (body: Json, at: number) => Json

/** Changes one thing in a body, somewhere: a value, a key left out, a key nobody knows. */
export const spoiling: fc.Arbitrary<(body: Json) => Json> = fc
  .record({
    change: fc.oneof(
      fc.constantFrom(...ABSURD).map(
        (value): Change =>
          (body, at) =>
            replaced(body, at, value),
      ),
      fc.constant<Change>(left),
      fc.constantFrom('unknown', '__proto__', 'academyId').map(
        (key): Change =>
          (body, at) =>
            extended(body, at, key),
      ),
    ),
    at: fc.nat(40),
  })
  .map(
    ({ change, at }) =>
      (body) =>
        change(body, at),
  )

/** Bodies that are no JSON, or are far too much of it. */
export const BROKEN: readonly { name: string; body: string | Uint8Array; type?: string }[] = [
  { name: 'cut off', body: '{"name": "Sker' },
  { name: 'no object', body: '"just a text"' },
  { name: 'not UTF-8', body: Uint8Array.from([0x7b, 0x22, 0xff, 0xfe, 0x22, 0x3a, 0x31, 0x7d]) },
  { name: 'nested deeply', body: `${'['.repeat(2_000)}${']'.repeat(2_000)}` },
  { name: 'oversized', body: JSON.stringify({ name: 'x'.repeat(70_000) }) },
  { name: 'of many parts', body: `[${'0,'.repeat(5_000)}0]` },
  { name: 'another kind', body: 'name=Skerrow', type: 'application/x-www-form-urlencoded' },
  { name: 'in another alphabet', body: '{}', type: 'application/json; charset=utf-7' },
]

function replaced(body: Json, at: number, value: Json): Json {
  const places = placesIn(body)
  return change(body, places[at % places.length] ?? [], () => value)
}

function left(body: Json, at: number): Json {
  const places = placesIn(body).filter((path) => path.length > 0)
  const path = places[at % Math.max(1, places.length)]
  return path ? change(body, path, () => undefined) : body
}

function extended(body: Json, at: number, key: string): Json {
  const objects = placesIn(body).filter((path) => isObject(valueAt(body, path)))
  const path = objects[at % Math.max(1, objects.length)] ?? []
  return change(body, path, (had) => {
    const entries = isObject(had) ? Object.entries(had) : []
    // Written so that "__proto__" is a key like any other.
    return Object.fromEntries([...entries, [key, 'surplus']])
  })
}

const isObject = (value: Json | undefined): value is { [key: string]: Json } =>
  typeof value === 'object' && value !== null && !Array.isArray(value)

function placesIn(body: Json, path: readonly string[] = []): string[][] {
  const inner =
    typeof body === 'object' && body !== null
      ? Object.entries(body).flatMap(([key, value]) => placesIn(value, [...path, key]))
      : []
  return [[...path], ...inner]
}

function valueAt(body: Json, path: readonly string[]): Json | undefined {
  const [key, ...rest] = path
  if (key === undefined) return body
  if (typeof body !== 'object' || body === null) return undefined
  return valueAt((body as { [key: string]: Json })[key] ?? null, rest)
}

function change(
  body: Json,
  [key, ...rest]: readonly string[],
  to: (had: Json) => Json | undefined,
): Json {
  if (key === undefined) return to(body) ?? null
  const entries = Object.entries(body ?? {}).flatMap(([name, value]: [string, Json]) => {
    if (name !== key) return [[name, value] as const]
    const next = rest.length === 0 ? to(value) : change(value, rest, to)
    return next === undefined ? [] : [[name, next] as const]
  })
  return Array.isArray(body) ? entries.map(([, value]) => value) : Object.fromEntries(entries)
}
