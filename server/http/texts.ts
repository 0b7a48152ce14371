/** Words the server sends: mails and problem texts, from the same files as the pages. */
import i18next, { type TFunction } from 'i18next'
import type { Request } from 'express'
import { locales, type Locale } from '#contract/common.ts'
import { resources } from '../../locales/index.ts'

const texts = i18next.createInstance()
await texts.init({
  lng: 'en',
  fallbackLng: 'en',
  resources,
  ns: Object.keys(resources.en),
  defaultNS: 'common',
  interpolation: { escapeValue: false },
})

export const textsIn = (language: Locale): TFunction => texts.getFixedT(language)

/** The caller's language: `Accept-Language` among ours, else English. */
export function localeOf(req: Request): Locale {
  const found = req.acceptsLanguages([...locales])
  return locales.find((one) => one === found) ?? 'en'
}
