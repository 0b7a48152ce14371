import { useEffect, useId, useRef, type ReactNode } from 'react'

interface DialogProps {
  open: boolean
  onClose: () => void
  title: ReactNode
  children: ReactNode
}

/** The browser's own modal dialog: focus goes in and back out, Escape closes, the page behind is inert. */
export function Dialog({ open, onClose, title, children }: DialogProps) {
  const ref = useRef<HTMLDialogElement>(null)
  const id = useId()
  useEffect(() => {
    const dialog = ref.current
    if (!dialog) return
    if (open && !dialog.open) dialog.showModal()
    if (!open && dialog.open) dialog.close()
  }, [open])
  return (
    <dialog
      ref={ref}
      aria-labelledby={id}
      onClose={onClose}
      className="m-auto w-[min(36rem,calc(100vw-2rem))] border border-strong bg-sheet p-6 text-ink backdrop:bg-ink/40"
    >
      <h2 id={id} className="mb-3">
        {title}
      </h2>
      {open && children}
    </dialog>
  )
}
