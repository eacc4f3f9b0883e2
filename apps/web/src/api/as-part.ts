import { ApiProblem } from './problem'

/**
 * Waits for one part of what a form does. Wrong fields are named under the part ("account.name"), so
 * that two parts of one form can both have a name and only the wrong one is marked.
 */
export async function asPart<T>(part: string, work: Promise<T>): Promise<T> {
  try {
    return await work
  } catch (error) {
    if (!(error instanceof ApiProblem)) throw error
    const fields = Object.fromEntries(
      Object.entries(error.fields).map(([path, sentence]) => [`${part}.${path}`, sentence]),
    )
    throw new ApiProblem({ code: error.code, status: error.status, detail: error.message, fields })
  }
}
