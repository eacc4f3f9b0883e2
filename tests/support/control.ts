/** A stand-in's control over HTTP, as another process uses it. @throws Error for a refusal. */
export async function control(fake: { url: string }, name: string, body: object = {}) {
  const response = await fetch(`${fake.url}/_control/${name}`, {
    method: 'POST',
    headers: { 'content-type': 'application/json' },
    body: JSON.stringify(body),
  })
  if (!response.ok) throw new Error(`${name} was refused: ${await response.text()}`)
  // Every control answers in this shape.
  return ((await response.json()) as { outcome: unknown }).outcome
}
