import { PROBLEM_STATUS } from './problems'

/** `ProblemDocument` as JSON Schema, for the OpenAPI document. */
export const problemSchema = {
  type: 'object',
  required: ['type', 'title', 'status', 'code', 'detail'],
  properties: {
    type: { type: 'string' },
    title: { type: 'string' },
    status: { type: 'integer', minimum: 400, maximum: 599 },
    code: { type: 'string', enum: Object.keys(PROBLEM_STATUS) },
    detail: { type: 'string', description: 'One sentence: what happened and what to do.' },
    requestId: { type: 'string' },
    fields: {
      type: 'object',
      description: 'For `invalid-fields`: a sentence for each wrong field, by its path.',
      additionalProperties: { type: 'string' },
    },
  },
}
