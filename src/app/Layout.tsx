import { useEffect, useRef } from 'react'
import { useTranslation } from 'react-i18next'
import { Outlet, ScrollRestoration, useLocation, useNavigation } from 'react-router-dom'
import { Footer } from './Footer.tsx'
import { Header } from './Header.tsx'

/** Header, page, footer. On a change of page the focus goes to the new page, so that nobody has to tab past the header again. */
export function Layout() {
  const { t } = useTranslation()
  const { pathname } = useLocation()
  const navigation = useNavigation()
  const main = useRef<HTMLElement>(null)
  const first = useRef(true)
  useEffect(() => {
    if (first.current) {
      first.current = false
      return
    }
    main.current?.focus({ preventScroll: true })
  }, [pathname])
  return (
    <div className="flex min-h-dvh flex-col">
      <a
        href="#page"
        className="absolute start-2 top-2 z-50 -translate-y-20 bg-ink px-4 py-3 text-sheet focus:translate-y-0"
      >
        {t('nav.skip')}
      </a>
      <Header />
      <div aria-hidden className={`h-0.5 ${navigation.state === 'loading' ? 'animate-pulse bg-own' : ''}`} />
      <main id="page" ref={main} tabIndex={-1} className="flex-1 md:px-4 md:py-5">
        <Outlet />
      </main>
      <Footer />
      <ScrollRestoration />
    </div>
  )
}
