import type { ReactNode } from 'react'
import { Dialog as AriaDialog, Heading, Modal, ModalOverlay } from 'react-aria-components'

/**
 * A sheet laid over the page. The page behind waits; Esc closes it, and so does a press outside,
 * unless something may be written on it, which a slip of the hand must not throw away.
 */
export function Dialog(props: {
  title: string
  isOpen: boolean
  onClose: () => void
  isWrittenOn?: boolean
  children: ReactNode
}) {
  return (
    <ModalOverlay
      className="overlay"
      isOpen={props.isOpen}
      isDismissable={!props.isWrittenOn}
      onOpenChange={(isOpen) => {
        if (!isOpen) props.onClose()
      }}
    >
      <Modal className="sheet">
        <AriaDialog>
          <Heading slot="title" className="disp">
            {props.title}
          </Heading>
          {props.children}
        </AriaDialog>
      </Modal>
    </ModalOverlay>
  )
}
