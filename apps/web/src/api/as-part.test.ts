import { expect, it } from 'vitest'
import { asPart } from './as-part'
import { ApiProblem } from './problem'

const refused = (fields: Record<string, string>) =>
  Promise.reject(
    new ApiProblem({ code: 'invalid-fields', status: 422, detail: 'Please fill this in.', fields }),
  )

it('names the wrong fields under the part that refused them', async () => {
  const part = asPart('account', refused({ name: 'Please fill this in.' }))
  await expect(part).rejects.toMatchObject({
    code: 'invalid-fields',
    status: 422,
    message: 'Please fill this in.',
    fields: { 'account.name': 'Please fill this in.' },
  })
})

it('lets an answer and a fault through as they are', async () => {
  const fault = new Error('a fault')
  await expect(asPart('account', Promise.resolve(7))).resolves.toBe(7)
  await expect(asPart('account', Promise.reject(fault))).rejects.toBe(fault)
})
