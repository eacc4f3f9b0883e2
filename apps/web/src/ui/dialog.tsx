import type { ReactNode } from 'react'
import { Dialog as AriaDialog, Heading, Modal, ModalOverlay } from 'react-aria-components'

/** A sheet laid over the page. The page behind waits; Esc and a press outside close it. */
export function Dialog(props: {
  title: string
  isOpen: boolean
  onClose: () => void
  children: ReactNode
}) {
  return (
    <ModalOverlay
      className="overlay"
      isOpen={props.isOpen}
      isDismissable
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
