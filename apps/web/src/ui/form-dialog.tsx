import type { ComponentProps, ReactNode } from 'react'
import { Button } from './button'
import { Dialog } from './dialog'
import { Notice } from './notice'

/** A sheet with a form on it: its fields, what is wrong with the whole, the deed, and a way out. */
export function FormDialog(props: {
  title: string
  /** The deed: "Save venue". */
  action: string
  form: ComponentProps<'form'>
  sentence: string | null
  isSending: boolean
  onClose: () => void
  children: ReactNode
}) {
  const { title, action, form, sentence, isSending, onClose } = props
  return (
    <Dialog title={title} isOpen isWrittenOn onClose={onClose}>
      <form {...form}>
        {sentence && <Notice kind="flag">{sentence}</Notice>}
        {props.children}
        <div className="actions">
          <Button type="submit" kind="go" waiting={isSending && 'Keeping…'}>
            {action}
          </Button>
          <Button onClick={onClose}>Not now</Button>
        </div>
      </form>
    </Dialog>
  )
}
