import { useRef, useState, type SubmitEvent } from 'react'
import { focusFirstWrong } from '../ui/field'
import { ApiProblem } from './problem'

const NONE: Readonly<Record<string, string>> = {}

/**
 * A form whose refusal comes from the API: each field's sentence beside it, the rest above. After a
 * refusal the focus goes to the first field that is wrong; nothing written is lost.
 */
export function useForm(send: () => Promise<unknown>) {
  const ref = useRef<HTMLFormElement>(null)
  const [problem, setProblem] = useState<ApiProblem | null>(null)
  const [isSending, setIsSending] = useState(false)
  const submit = async () => {
    setProblem(null)
    setIsSending(true)
    try {
      await send()
    } catch (caught) {
      if (!(caught instanceof ApiProblem)) throw caught
      setProblem(caught)
      focusFirstWrong(ref.current)
    } finally {
      setIsSending(false)
    }
  }
  const errors = problem?.fields ?? NONE
  return {
    isSending,
    errors,
    /** What is wrong with the whole of it; null where each wrong field says so itself. */
    sentence: problem && Object.keys(errors).length === 0 ? problem.message : null,
    /** All that is wrong, for a form whose fields stand inside a sentence. */
    all: problem && [problem.message, ...Object.values(errors)].join(' '),
    form: {
      ref,
      noValidate: true,
      onSubmit: (event: SubmitEvent) => {
        event.preventDefault()
        void submit()
      },
    },
  }
}
