import { useEffect } from 'react'

/** The window's title: what this page is, then whose it is. */
export function useTitle(title: string) {
  useEffect(() => {
    document.title = title === '' ? 'Felloe' : `${title} · Felloe`
  }, [title])
}
