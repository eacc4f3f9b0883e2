import { ProviderError } from '../provider-error'

/**
 * Puts objects where their ids stand, as `expand` asks: `latest_charge.balance_transaction`, or
 * `data.source` in a list. The object given is changed; every answer is built anew.
 * @throws ProviderError for a path that leads to no id.
 */
export function expandPaths(
  answer: object,
  given: { paths: readonly string[]; show: (id: string) => object | undefined },
): void {
  for (const path of given.paths) {
    const refuse = () =>
      new ProviderError(400, `This property cannot be expanded (${path}).`, { param: 'expand' })
    follow(answer, path.split('.'), { ...given, refuse })
  }
}

function follow(
  at: unknown,
  [name, ...rest]: string[],
  given: { show: (id: string) => object | undefined; refuse: () => ProviderError },
): void {
  if (Array.isArray(at)) {
    for (const item of at) follow(item, [name ?? '', ...rest], given)
    return
  }
  if (name === undefined || at === null) return
  if (typeof at !== 'object' || !(name in at)) throw given.refuse()
  // An object of an answer, by the names that the API gives its fields.
  const record = at as Record<string, unknown>
  const value = record[name]
  if (typeof value === 'string') {
    const object = given.show(value)
    if (!object) throw given.refuse()
    record[name] = object
  } else if (value !== null && typeof value !== 'object') throw given.refuse()
  follow(record[name], rest, given)
}
