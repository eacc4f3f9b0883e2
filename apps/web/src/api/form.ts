import { useRef, useState, type SubmitEvent } from 'react'
import { focusFirstWrong } from '../ui/field'
import { noticeOf, type ShownFields } from './notice-of'
import { problemOf, type ApiProblem } from './problem'

const NONE: Readonly<Record<string, string>> = {}

/**
 * A form whose refusal comes from the API: each field's sentence beside it, the rest above. After a
 * refusal the focus goes to the first field that is wrong; nothing written is lost.
 */
export function useForm(send: () => Promise<unknown>, shown: ShownFields = {}) {
  const ref = useRef<HTMLFormElement>(null)
  const [problem, setProblem] = useState<ApiProblem | null>(null)
  const [isSending, setIsSending] = useState(false)
  const refuse = (refused: ApiProblem | null) => {
    setProblem(refused)
    if (refused) focusFirstWrong(ref.current)
  }
  const submit = async () => {
    refuse(null)
    setIsSending(true)
    try {
      await send()
    } catch (caught) {
      refuse(problemOf(caught))
    } finally {
      setIsSending(false)
    }
  }
  return {
    isSending,
    problem,
    /** Shows what another press on the form was refused for; null clears it. */
    refuse,
    errors: problem?.fields ?? NONE,
    /** All that is wrong and that no field of the form says beside itself. */
    sentence: problem && noticeOf(problem, shown),
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
